import { eq, and } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { z } from 'zod'
import type { LookBodySchema, ReleaseBodySchema } from '../../shared/schemas/pieces'
import type { Db } from '../db/client'
import { revisions } from '../db/schema/lessons'
import { notes } from '../db/schema/pieces'
import { inTransaction } from '../db/transaction'
import type { Actor } from './actor'
import { queueMail } from './mail'
import { actOnPiece, isDone } from './piece-acts'
import { keepWords } from './words'

/** Lets a wrong question go. The words are kept apart; whoever put the revision into use gets a letter about it. */
export async function releaseHold(db: Db, who: Actor, tablet: string, pieceId: string, { id, turn, says }: z.infer<typeof ReleaseBodySchema>, now: Date): Promise<void> {
  await inTransaction(db, async (tx) => {
    if (await isDone(tx, who.studioId, id)) return
    const words = await keepWords(tx, who, says, now)
    const { row, lesson } = await actOnPiece(tx, who, { pieceId, tablet, id, kind: 'hold.released', body: { turn, words: words.id } }, now)
    const [revision] = await tx.select({ by: revisions.by, number: revisions.number }).from(revisions).where(and(eq(revisions.studioId, who.studioId), eq(revisions.id, row.revisionId)))
    if (revision) {
      await queueMail(tx, { studioId: who.studioId, toPerson: revision.by, kind: 'hold-released', body: { lesson: lesson.title, revision: revision.number, turn, words: words.id, by: who.personId }, dedupeKey: `hold-released ${id}` }, now)
    }
  })
}

/** Gives the look that was asked for. A word to the maker waits until the piece is down; a danger note does not. */
export async function giveLook(db: Db, who: Actor, tablet: string, pieceId: string, { id, says, danger }: z.infer<typeof LookBodySchema>, now: Date): Promise<void> {
  await inTransaction(db, async (tx) => {
    if (await isDone(tx, who.studioId, id)) return
    const words = says ? await keepWords(tx, who, says, now) : null
    const { row } = await actOnPiece(tx, who, { pieceId, tablet, id, kind: 'look.given', body: { words: words?.id ?? null } }, now)
    if (words) await tx.insert(notes).values({ studioId: who.studioId, id: ulid(now.getTime()), personId: row.personId, pieceId, wordsId: words.id, danger, at: now })
  })
}
