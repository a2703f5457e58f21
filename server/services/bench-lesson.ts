import { and, asc, count, desc, eq } from 'drizzle-orm'
import { may } from '../../shared/judging/roles'
import { lapse } from '../../shared/judging/lapse'
import { NOTHING_HELD } from '../../shared/judging/signer'
import type { Lesson, Permission } from '../../shared/lesson/schema'
import type { State } from '../../shared/bench/state'
import type { BenchLesson } from '../../shared/types/bench'
import type { Db, DbOrTx } from '../db/client'
import { classLessons, revisionPictures, revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import { classPeople } from '../db/schema/studio'
import type { Actor } from './actor'
import { titlesBySlug } from './bench-home'
import { compiledLesson } from './compiled'
import { heldBy, todayOf } from './judging-facts'
import { isState } from './ledger'
import { lessonOf } from './lessons'
import { heldPermissions } from './permissions'
import { found } from './refuse'

/** A lesson in use as the bench needs it before a piece. 404 when it is none of the person's classes' or not in use. */
export async function benchLesson(db: Db, who: Actor, address: string, now: Date): Promise<BenchLesson> {
  const lesson = await lessonOf(db, who.studioId, address)
  if (!may(who.roles, 'see-lessons') && !await isInClass(db, who, lesson.id)) found(null)
  const [revision] = await db.select({ id: revisions.id, number: revisions.number, compiledSha: revisions.compiledSha, engine: revisions.engine, title: revisions.title }).from(revisions)
    .where(and(eq(revisions.studioId, who.studioId), eq(revisions.id, lesson.currentRevision ?? '')))
  const current = found(lesson.putAwayAt ? null : revision)
  const compiled = await compiledLesson(db, who.studioId, current.id)
  const { settings, today } = await todayOf(db, who.studioId, now)
  const held = await heldBy(db, who.studioId, who.personId)
  const levelOf = (id: string) => lapse(held.get(id) ?? NOTHING_HELD, settings, today).level
  const titles = await titlesBySlug(db, who.studioId)
  const [made] = await db.select({ count: count() }).from(pieces).where(and(eq(pieces.studioId, who.studioId), eq(pieces.personId, who.personId), eq(pieces.lessonId, lesson.id)))
  return {
    lesson: { id: lesson.id, slug: lesson.slug }, revision: current, compiled, level: levelOf(lesson.id), pieceNo: (made?.count ?? 0) + 1,
    pictures: await picturesOf(db, who.studioId, current.id), lacks: await lackedPermissions(db, who, compiled),
    needs: compiled.needs.flatMap((slug) => { const needed = titles.get(slug); return needed && levelOf(needed.id) < settings.neededLevel ? [{ slug, title: needed.title }] : [] }),
    ...await piecesBefore(db, who, lesson.id, current.id, now),
  }
}

async function isInClass(db: DbOrTx, who: Actor, lessonId: string): Promise<boolean> {
  const rows = await db.select({ id: classLessons.id }).from(classLessons)
    .innerJoin(classPeople, and(eq(classPeople.studioId, classLessons.studioId), eq(classPeople.classId, classLessons.classId)))
    .where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.lessonId, lessonId), eq(classPeople.personId, who.personId))).limit(1)
  return rows.length > 0
}

async function picturesOf(db: DbOrTx, studioId: string, revisionId: string): Promise<BenchLesson['pictures']> {
  const rows = await db.select({ name: revisionPictures.name, alt: revisionPictures.alt, mirror: revisionPictures.mirror }).from(revisionPictures)
    .where(and(eq(revisionPictures.studioId, studioId), eq(revisionPictures.revisionId, revisionId))).orderBy(asc(revisionPictures.name))
  return rows.map(row => ({ ...row, mirror: row.mirror === 1 }))
}

/** Of what the lesson or one of its steps asks for, what this person may not do yet. */
async function lackedPermissions(db: DbOrTx, who: Actor, lesson: Lesson): Promise<Permission[]> {
  const asked = new Set<Permission>([...lesson.permissions, ...lesson.parts.flatMap(part => part.steps.flatMap(step => step.needs ?? []))])
  return (await heldPermissions(db, who.studioId, who.personId, [...asked])).filter(one => one.state !== 'held').map(one => one.permission)
}

/** The sizes told last in this lesson, and today's pieces of this revision (by the UTC day, as the machine counts it). */
async function piecesBefore(db: DbOrTx, who: Actor, lessonId: string, revisionId: string, now: Date): Promise<Pick<BenchLesson, 'last' | 'earlier'>> {
  const rows = await db.select({ state: pieces.state, revisionId: pieces.revisionId }).from(pieces)
    .where(and(eq(pieces.studioId, who.studioId), eq(pieces.personId, who.personId), eq(pieces.lessonId, lessonId))).orderBy(desc(pieces.startedAt)).limit(20)
  const states = rows.flatMap((row): { state: State, revisionId: string }[] => isState(row.state) && row.state.start ? [{ state: row.state, revisionId: row.revisionId }] : [])
  const day = now.toISOString().slice(0, 10)
  return { last: states[0]?.state.start?.sizes ?? null, earlier: states.filter(one => one.revisionId === revisionId && one.state.startedAt?.slice(0, 10) === day).map(one => one.state) }
}
