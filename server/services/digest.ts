import { and, asc, eq, inArray } from 'drizzle-orm'
import { BODIES } from '../../shared/bench/events'
import { shaOf } from '../../shared/lesson/canonical'
import type { DbOrTx } from '../db/client'
import { judgements, marks } from '../db/schema/judging'
import { revisions } from '../db/schema/lessons'
import { pieceEvents, pieces } from '../db/schema/pieces'

/**
 * What a sign-off rests on, as one hash: of each piece the source of its revision, what was shown of it (n and head), its
 * photos as they were taken, and every mark. Photos that joined later are not in it: `n` says which had been told of.
 */
export async function digestOf(db: DbOrTx, studioId: string, judgementIds: readonly string[]): Promise<string> {
  const rows = await db.select({ judgement: judgements, sourceSha: revisions.sourceSha }).from(judgements)
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .innerJoin(revisions, and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId)))
    .where(and(eq(judgements.studioId, studioId), inArray(judgements.id, [...judgementIds]))).orderBy(asc(judgements.pieceId))
  const given = await db.select().from(marks).where(and(eq(marks.studioId, studioId), inArray(marks.judgementId, [...judgementIds]))).orderBy(asc(marks.criterion))
  const taken = await photosShown(db, studioId, rows.map(row => row.judgement))
  return shaOf(rows.map(({ judgement, sourceSha }) => ({
    piece: judgement.pieceId, revision: sourceSha, n: judgement.n, head: judgement.head, photos: taken.get(judgement.pieceId) ?? [],
    marks: given.filter(mark => mark.judgementId === judgement.id)
      .map(({ criterion, says, value, unit, within, essential, rest }) => ({ criterion, says, value, unit, within, essential, rest })),
  })))
}

/** Hashes of the photos told of by the first `n` events of each piece, in the order they were told. */
async function photosShown(db: DbOrTx, studioId: string, judged: readonly { pieceId: string, n: number }[]): Promise<Map<string, string[]>> {
  const rows = judged.length === 0
    ? []
    : await db.select({ pieceId: pieceEvents.pieceId, n: pieceEvents.n, body: pieceEvents.body }).from(pieceEvents)
        .where(and(eq(pieceEvents.studioId, studioId), inArray(pieceEvents.pieceId, judged.map(one => one.pieceId)), eq(pieceEvents.kind, 'photo.taken')))
        .orderBy(asc(pieceEvents.pieceId), asc(pieceEvents.n))
  return new Map(judged.map(({ pieceId, n }) => [pieceId, rows.filter(row => row.pieceId === pieceId && row.n <= n).map(row => BODIES['photo.taken'].parse(JSON.parse(row.body)).sha256)]))
}
