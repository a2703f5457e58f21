import { and, eq } from 'drizzle-orm'
import type { Lesson } from '../../shared/lesson/schema'
import type { DbOrTx } from '../db/client'
import { revisions } from '../db/schema/lessons'
import { found } from './refuse'

/** A revision never changes, so what was read once may be kept. Keyed by studio and revision; the oldest leaves first. */
const kept = new Map<string, Lesson>()
const MOST_KEPT = 60

/** The compiled value of a revision of this studio, or 404. */
export async function compiledLesson(db: DbOrTx, studioId: string, revisionId: string): Promise<Lesson> {
  const key = `${studioId} ${revisionId}`
  const known = kept.get(key)
  if (known) return known
  const [row] = await db.select({ compiled: revisions.compiled }).from(revisions).where(and(eq(revisions.studioId, studioId), eq(revisions.id, revisionId)))
  const lesson = found(row).compiled
  if (kept.size >= MOST_KEPT) kept.delete(kept.keys().next().value ?? '')
  kept.set(key, lesson)
  return lesson
}
