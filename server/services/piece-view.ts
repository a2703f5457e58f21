import { and, eq } from 'drizzle-orm'
import { may } from '../../shared/judging/roles'
import type { Db } from '../db/client'
import { revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import type { Actor } from './actor'
import { compiledLesson } from './compiled'
import { storedEvents } from './ledger'
import { found } from './refuse'

/** The row of a piece for its maker and for who may see pieces; 404 for everyone else. */
export async function visiblePiece(db: Db, who: Actor, pieceId: string) {
  const [row] = await db.select().from(pieces).where(and(eq(pieces.studioId, who.studioId), eq(pieces.id, pieceId)))
  const piece = found(row)
  if (piece.personId !== who.personId && !may(who.roles, 'see-pieces')) found(null)
  return piece
}

export async function eventsAfter(db: Db, who: Actor, pieceId: string, after: number) {
  const piece = await visiblePiece(db, who, pieceId)
  return { events: await storedEvents(db, who.studioId, pieceId, after), n: piece.n, head: piece.head }
}

/** A piece with the revision it runs on and all its events. */
export async function pieceView(db: Db, who: Actor, pieceId: string) {
  const row = await visiblePiece(db, who, pieceId)
  const [revision] = await db.select({ id: revisions.id, number: revisions.number, title: revisions.title, compiledSha: revisions.compiledSha, engine: revisions.engine }).from(revisions)
    .where(and(eq(revisions.studioId, who.studioId), eq(revisions.id, row.revisionId)))
  const { state: _state, machine: _machine, ...piece } = row
  return {
    piece, revision: found(revision), compiled: await compiledLesson(db, who.studioId, row.revisionId),
    events: await storedEvents(db, who.studioId, pieceId), n: row.n, head: row.head,
  }
}
