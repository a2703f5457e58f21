import { and, desc, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { DraftBody } from '../../shared/schemas/lessons'
import type { DraftView } from '../../shared/types/lessons'
import type { Db, DbOrTx } from '../db/client'
import { inTransaction } from '../db/transaction'
import { drafts, revisions } from '../db/schema/lessons'
import type { Actor } from './actor'
import { lessonOf, slugsOf, stageOf } from './lessons'
import { namesOf } from './names'
import { picturesBeside } from './pictures'
import { found, refuse } from './refuse'

export type DraftRecord = typeof drafts.$inferSelect

/** The draft of a lesson of this studio. `lock` holds it until the transaction ends. */
export async function draftOf(db: DbOrTx, studioId: string, lessonId: string, lock = false): Promise<DraftRecord> {
  const query = db.select().from(drafts).where(and(eq(drafts.studioId, studioId), eq(drafts.lessonId, lessonId)))
  const [row] = lock ? await query.for('update') : await query
  return found(row)
}

/** The last revision of a lesson, in use or not, or null. */
export async function lastRevision(db: DbOrTx, studioId: string, lessonId: string) {
  const [row] = await db.select({ id: revisions.id, number: revisions.number, compiled: revisions.compiled }).from(revisions)
    .where(and(eq(revisions.studioId, studioId), eq(revisions.lessonId, lessonId))).orderBy(desc(revisions.number)).limit(1)
  return row ?? null
}

/** The text in hand with all the desk needs to check it as the server would. */
export async function readDraft(db: Db, { studioId, personId }: Actor, address: string): Promise<DraftView> {
  const lesson = await lessonOf(db, studioId, address)
  const draft = await draftOf(db, studioId, lesson.id)
  const last = await lastRevision(db, studioId, lesson.id)
  const [base] = draft.baseRevision ? await db.select({ number: revisions.number }).from(revisions).where(and(eq(revisions.studioId, studioId), eq(revisions.id, draft.baseRevision))) : []
  const names = await namesOf(db, [draft.savedBy])
  return {
    reader: personId,
    lesson: { id: lesson.id, slug: lesson.slug, stage: stageOf(lesson, last ? 1 : 0) },
    source: draft.source, etag: draft.etag, savedAt: draft.savedAt.toISOString(), by: names.get(draft.savedBy) ?? '',
    base: base ?? null, pictures: await picturesBeside(db, studioId, lesson.id), slugs: await slugsOf(db, studioId), previous: last?.compiled ?? null,
  }
}

/**
 * Keeps a text, finished or not. 409 with who, when and the other text where another was kept since the one it was
 * written on; the same text again is already kept, so a repeat whose answer was lost changes nothing.
 */
export async function saveDraft(db: Db, who: Actor, address: string, { etag, source }: DraftBody, now: Date): Promise<{ etag: string, savedAt: string }> {
  const { id } = await lessonOf(db, who.studioId, address)
  const { kept, draft } = await inTransaction(db, async (tx) => {
    const draft = await draftOf(tx, who.studioId, id, true)
    if (draft.source === source) return { kept: { etag: draft.etag, savedAt: draft.savedAt.toISOString() }, draft }
    if (draft.etag !== etag) return { kept: null, draft }
    const next = { etag: ulid(now.getTime()), savedAt: now }
    await tx.update(drafts).set({ source, savedBy: who.personId, ...next }).where(and(eq(drafts.studioId, who.studioId), eq(drafts.id, draft.id)))
    return { kept: { etag: next.etag, savedAt: now.toISOString() }, draft }
  })
  if (kept) return kept
  const by = (await namesOf(db, [draft.savedBy])).get(draft.savedBy) ?? 'Another'
  const isMine = draft.savedBy === who.personId
  refuse(409, `${isMine ? 'You' : by} kept another text of this lesson${isMine ? ' elsewhere' : ''} since this one was begun. Nothing is lost: choose which to go on with.`,
    { by, isMine, at: draft.savedAt.toISOString(), source: draft.source, etag: draft.etag })
}

/** Makes a text the draft, whatever was there: for what comes by import. */
export async function replaceDraft(db: Db, who: Actor, lessonId: string, source: string, now: Date): Promise<{ etag: string }> {
  return await inTransaction(db, async (tx) => {
    const draft = await draftOf(tx, who.studioId, lessonId, true)
    if (draft.source === source) return { etag: draft.etag }
    const etag = ulid(now.getTime())
    await tx.update(drafts).set({ source, savedBy: who.personId, savedAt: now, etag }).where(and(eq(drafts.studioId, who.studioId), eq(drafts.id, draft.id)))
    return { etag }
  })
}
