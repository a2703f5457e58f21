import { and, asc, eq, inArray, isNull, max, or, gte } from 'drizzle-orm'
import type { z } from 'zod'
import { dayIn } from '../../shared/bench/day'
import type { ClassLessonBodySchema, NewClassBodySchema } from '../../shared/schemas/people'
import type { Db } from '../db/client'
import { classLessons, lessons, revisions } from '../db/schema/lessons'
import { classes, classPeople, memberships, studios } from '../db/schema/studio'
import { isDuplicate } from '../db/transaction'
import type { Actor } from './actor'
import { currentNames, nameIn } from './names'
import { found, refuse } from './refuse'
import { makeCard } from './tokens'

/** The classes of the studio, the newest term first. */
export async function listClasses(db: Db, studioId: string) {
  return await db.select().from(classes).where(eq(classes.studioId, studioId)).orderBy(asc(classes.weekday), asc(classes.name))
}

export async function makeClass(db: Db, who: Actor, body: z.infer<typeof NewClassBodySchema>) {
  try {
    await db.insert(classes).values({ studioId: who.studioId, ...body })
  }
  catch (error) {
    if (!isDuplicate(error)) throw error
  }
  return await classOf(db, who.studioId, body.id)
}

export async function classOf(db: Db, studioId: string, id: string) {
  const [row] = await db.select().from(classes).where(and(eq(classes.studioId, studioId), eq(classes.id, id)))
  return found(row)
}

/** A class with the people in it today and its lessons in order. */
export async function classView(db: Db, who: Actor, id: string, now: Date) {
  const row = await classOf(db, who.studioId, id)
  const [studio] = await db.select({ zone: studios.zone }).from(studios).where(eq(studios.id, who.studioId))
  const today = dayIn(studio?.zone ?? 'UTC', now)
  const inIt = await db.select({ id: classPeople.personId, fromOn: classPeople.fromOn, ageBand: memberships.ageBand }).from(classPeople)
    .innerJoin(memberships, and(eq(memberships.studioId, classPeople.studioId), eq(memberships.personId, classPeople.personId)))
    .where(and(eq(classPeople.studioId, who.studioId), eq(classPeople.classId, id), or(isNull(classPeople.untilOn), gte(classPeople.untilOn, today)), isNull(memberships.leftAt)))
  const names = await currentNames(db, inIt.map(one => one.id))
  const taught = await db.select({ id: lessons.id, slug: lessons.slug, title: revisions.title, place: classLessons.place }).from(classLessons)
    .innerJoin(lessons, and(eq(lessons.studioId, classLessons.studioId), eq(lessons.id, classLessons.lessonId)))
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.classId, id))).orderBy(asc(classLessons.place))
  return { ...row, people: inIt.map(one => ({ ...one, name: nameIn(names, one.id) })).sort((a, b) => a.name.localeCompare(b.name)), lessons: taught.map(one => ({ ...one, title: one.title ?? one.slug })) }
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

const EVENING_MS = 14 * 3600_000

/** Start cards for people of a class: each a code, good for this evening. Only those who are in the class get one. */
export async function makeCards(db: Db, who: Actor, classId: string, people: readonly string[], now: Date) {
  const { people: inIt, name } = await classView(db, who, classId, now)
  const [staff] = await db.select({ id: memberships.personId }).from(memberships)
    .where(and(eq(memberships.studioId, who.studioId), inArray(memberships.personId, [...people]))).limit(1)
  found(staff)
  const wanted = inIt.filter(person => people.includes(person.id))
  if (wanted.length < people.length) refuse(422, 'A start card is for people of this class.')
  const ends = new Date(now.getTime() + EVENING_MS)
  const cards = []
  for (const person of wanted) cards.push({ personId: person.id, name: person.name, code: await makeCard(db, { personId: person.id, emailKey: null, studioId: who.studioId, ends }, now) })
  return { className: name, ends: ends.toISOString(), cards }
}
