import { and, asc, desc, eq, sql } from 'drizzle-orm'
import { ulid } from 'ulid'
import { skeletonOf } from '../../shared/lesson/skeleton'
import { freeSlug, titleOf } from '../../shared/lesson/titles'
import { signDrawing } from '../../shared/lesson/usual'
import type { NewLessonBody } from '../../shared/schemas/lessons'
import type { LessonRow, LessonStage } from '../../shared/types/lessons'
import type { Db, DbOrTx, Tx } from '../db/client'
import { inTransaction, isDuplicate } from '../db/transaction'
import { drafts, lessons, revisions } from '../db/schema/lessons'
import type { Actor } from './actor'
import { compiledLesson } from './compiled'
import { namesOf } from './names'
import { found, refuse } from './refuse'

export type LessonRecord = typeof lessons.$inferSelect
const IS_ULID = /^[0-7][0-9A-HJKMNP-TV-Z]{25}$/

/** A lesson of the studio by its slug or its id, or 404. */
export async function lessonOf(db: DbOrTx, studioId: string, address: string): Promise<LessonRecord> {
  const [row] = await db.select().from(lessons).where(and(eq(lessons.studioId, studioId), IS_ULID.test(address) ? eq(lessons.id, address) : eq(lessons.slug, address)))
  return found(row)
}

/** The slugs of a studio's lessons: what `needs:` may name. */
export async function slugsOf(db: DbOrTx, studioId: string): Promise<string[]> {
  const rows = await db.select({ slug: lessons.slug }).from(lessons).where(eq(lessons.studioId, studioId)).orderBy(asc(lessons.slug))
  return rows.map(row => row.slug)
}

/** Where a lesson is: put away, in use, withdrawn (was in use once), or still only written. */
export function stageOf(lesson: Pick<LessonRecord, 'putAwayAt' | 'currentRevision'>, revisionsMade: number): LessonStage {
  if (lesson.putAwayAt) return 'put-away'
  if (lesson.currentRevision) return 'in-use'
  return revisionsMade > 0 ? 'withdrawn' : 'draft'
}

/** What a draft is ahead of: the revision in use, else the one it was written on. */
const inForce = sql`COALESCE(${lessons.currentRevision}, ${drafts.baseRevision})`
const headOfDraft = sql<string>`LEFT(${drafts.source}, 8000)`
/** Byte by byte: the table's collation would take large and small letters for the same. */
const isAhead = sql<number>`BINARY ${drafts.source} <> BINARY ${revisions.source}`.mapWith(Number)

/** Every lesson of the studio as one row of the list, in the order of crafts and titles. */
export async function listLessons(db: Db, studioId: string): Promise<LessonRow[]> {
  const rows = await db.select({ lesson: lessons, head: headOfDraft, savedAt: drafts.savedAt, savedBy: drafts.savedBy, ahead: isAhead }).from(lessons)
    .leftJoin(drafts, and(eq(drafts.studioId, lessons.studioId), eq(drafts.lessonId, lessons.id)))
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, inForce)))
    .where(eq(lessons.studioId, studioId))
  const made = await db.select({ id: revisions.id, lessonId: revisions.lessonId, number: revisions.number, title: revisions.title, at: revisions.at, by: revisions.by })
    .from(revisions).where(eq(revisions.studioId, studioId)).orderBy(desc(revisions.number))
  const names = await namesOf(db, [...made.map(row => row.by), ...rows.map(row => row.savedBy ?? row.lesson.owner)])
  const list: LessonRow[] = []
  for (const { lesson, head, savedAt, savedBy, ahead } of rows) {
    const mine = made.filter(row => row.lessonId === lesson.id)
    const revision = mine.find(row => row.id === lesson.currentRevision) ?? mine[0]
    const compiled = revision ? await compiledLesson(db, studioId, revision.id) : null
    list.push({
      id: lesson.id, slug: lesson.slug, craft: lesson.craft, title: revision?.title ?? titleOf(head ?? '') ?? lesson.slug,
      needs: compiled?.needs ?? [], time: compiled?.time ?? null, drawing: compiled ? signDrawing(compiled) : null,
      stage: stageOf(lesson, mine.length), revision: revision ? { number: revision.number, at: revision.at.toISOString() } : null,
      author: names.get(revision?.by ?? savedBy ?? lesson.owner) ?? '', draft: savedAt && (!revision || ahead !== 0) ? { savedAt: savedAt.toISOString() } : null,
    })
  }
  return list.sort((a, b) => a.title.localeCompare(b.title, 'en'))
}

/** Makes a lesson with a text to begin from. The same id again is the same lesson. */
export async function makeLesson(db: Db, who: Actor, { id, title, craft }: NewLessonBody, now: Date): Promise<{ id: string, slug: string }> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await inTransaction(db, async (tx) => {
        const [there] = await tx.select({ id: lessons.id, slug: lessons.slug }).from(lessons).where(and(eq(lessons.studioId, who.studioId), eq(lessons.id, id)))
        if (there) return there
        const slug = freeSlug(title, await slugsOf(tx, who.studioId))
        await writeLesson(tx, who, { id, slug, craft, source: skeletonOf(title, craft) }, now)
        return { id, slug }
      })
    }
    catch (error) {
      // Another took the slug, or the same press came twice, between the look and the writing.
      if (attempt >= 3 || !isDuplicate(error)) throw error
    }
  }
}

/** The rows of a lesson and its draft. */
export async function writeLesson(tx: Tx, who: Actor, lesson: { id: string, slug: string, craft: NewLessonBody['craft'], source: string }, now: Date): Promise<void> {
  const { id, slug, craft, source } = lesson
  await tx.insert(lessons).values({ studioId: who.studioId, id, slug, craft, owner: who.personId, currentRevision: null, putAwayAt: null })
  await tx.insert(drafts).values({ studioId: who.studioId, id: ulid(now.getTime()), lessonId: id, source, savedBy: who.personId, savedAt: now, baseRevision: null, etag: ulid(now.getTime()) })
}

/** Puts a lesson away, or takes it out again. What is in use must be withdrawn first. */
export async function putAway(db: Db, who: Actor, address: string, away: boolean, now: Date): Promise<{ stage: LessonStage }> {
  return await inTransaction(db, async (tx) => {
    const { id } = await lessonOf(tx, who.studioId, address)
    const mine = and(eq(lessons.studioId, who.studioId), eq(lessons.id, id))
    const lesson = found((await tx.select().from(lessons).where(mine).for('update'))[0])
    if (away && lesson.currentRevision) refuse(409, 'This lesson is in use. Withdraw it first, then put it away.')
    const putAwayAt = away ? lesson.putAwayAt ?? now : null
    await tx.update(lessons).set({ putAwayAt }).where(mine)
    const made = await tx.select({ id: revisions.id }).from(revisions).where(and(eq(revisions.studioId, who.studioId), eq(revisions.lessonId, id)))
    return { stage: stageOf({ ...lesson, putAwayAt }, made.length) }
  })
}
