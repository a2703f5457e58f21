import { and, asc, eq, gte, isNull, lte, max, or } from 'drizzle-orm'
import type { z } from 'zod'
import { dayIn } from '../../shared/bench/day'
import type { ChangeClassBodySchema, ClassLessonBodySchema, NewClassBodySchema } from '../../shared/schemas/people'
import type { Db, DbOrTx } from '../db/client'
import { TERM_SAYS } from '../../shared/schemas/people'
import { classLessons, lessons, revisions } from '../db/schema/lessons'
import { classes, classPeople, memberships, studios } from '../db/schema/studio'
import { inTransaction, isDuplicate } from '../db/transaction'
import type { Actor } from './actor'
import { namesOf } from './names'
import { found, refuse } from './refuse'

/** The classes of the studio, the newest term first. */
export async function listClasses(db: Db, studioId: string) {
  return await db.select().from(classes).where(eq(classes.studioId, studioId)).orderBy(asc(classes.weekday), asc(classes.name))
}

/** Makes a class. The same id again is the same class. */
export async function makeClass(db: Db, who: Actor, body: z.infer<typeof NewClassBodySchema>) {
  try {
    await db.insert(classes).values({ studioId: who.studioId, ...body })
  }
  catch (error) {
    if (!isDuplicate(error)) throw error
  }
  return await classOf(db, who.studioId, body.id)
}

/** Changes what is named: its name, term or day. */
export async function changeClass(db: Db, who: Actor, id: string, body: z.infer<typeof ChangeClassBodySchema>) {
  return await inTransaction(db, async (tx) => {
    await classOf(tx, who.studioId, id)
    if (Object.keys(body).length > 0) await tx.update(classes).set(body).where(and(eq(classes.studioId, who.studioId), eq(classes.id, id)))
    const after = await classOf(tx, who.studioId, id)
    if (after.termFrom > after.termTo) refuse(422, TERM_SAYS, { fieldErrors: { termTo: [TERM_SAYS] } })
    return after
  })
}

/** The class, or 404. */
export async function classOf(db: DbOrTx, studioId: string, id: string) {
  const [row] = await db.select().from(classes).where(and(eq(classes.studioId, studioId), eq(classes.id, id)))
  return found(row)
}

/** A class with the people in it today and its lessons in order. */
export async function classView(db: Db, who: Actor, id: string, now: Date) {
  const row = await classOf(db, who.studioId, id)
  const [studio] = await db.select({ zone: studios.zone }).from(studios).where(eq(studios.id, who.studioId))
  const today = dayIn(studio?.zone ?? 'UTC', now)
  const inIt = await db.select({ id: classPeople.personId, fromOn: classPeople.fromOn, ageBand: memberships.ageBand, roles: memberships.roles }).from(classPeople)
    .innerJoin(memberships, and(eq(memberships.studioId, classPeople.studioId), eq(memberships.personId, classPeople.personId)))
    .where(and(eq(classPeople.studioId, who.studioId), eq(classPeople.classId, id), lte(classPeople.fromOn, today), or(isNull(classPeople.untilOn), gte(classPeople.untilOn, today)), isNull(memberships.leftAt)))
  const names = await namesOf(db, inIt.map(one => one.id))
  const taught = await db.select({ id: lessons.id, slug: lessons.slug, title: revisions.title, place: classLessons.place }).from(classLessons)
    .innerJoin(lessons, and(eq(lessons.studioId, classLessons.studioId), eq(lessons.id, classLessons.lessonId)))
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.classId, id))).orderBy(asc(classLessons.place))
  return { ...row, people: inIt.map(one => ({ ...one, name: names.get(one.id) ?? '' })).sort((a, b) => a.name.localeCompare(b.name)), lessons: taught.map(one => ({ ...one, title: one.title ?? one.slug })) }
}

/** Puts a lesson of the studio at the end of a class's lessons. */
export async function addLesson(db: Db, who: Actor, classId: string, { id, lessonId }: z.infer<typeof ClassLessonBodySchema>): Promise<void> {
  await classOf(db, who.studioId, classId)
  const [lesson] = await db.select({ id: lessons.id }).from(lessons).where(and(eq(lessons.studioId, who.studioId), eq(lessons.id, lessonId)))
  found(lesson)
  const [last] = await db.select({ place: max(classLessons.place) }).from(classLessons).where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.classId, classId)))
  try {
    await db.insert(classLessons).values({ studioId: who.studioId, id, classId, lessonId, place: (last?.place ?? 0) + 1 })
  }
  catch (error) {
    if (!isDuplicate(error)) throw error
  }
}

/** Takes a lesson out of a class. Pieces of it and what was signed stay as they are. */
export async function takeOutLesson(db: Db, who: Actor, classId: string, lessonId: string): Promise<void> {
  await classOf(db, who.studioId, classId)
  await db.delete(classLessons).where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.classId, classId), eq(classLessons.lessonId, lessonId)))
}
