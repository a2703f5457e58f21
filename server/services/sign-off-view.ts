import { and, asc, count, eq, gt, inArray, ne } from 'drizzle-orm'
import { may } from '../../shared/judging/roles'
import type { NameUnder, SignOffPiece, SignOffView } from '../../shared/types/judging'
import type { Db } from '../db/client'
import { judgements, signOffPieces, signOffs } from '../db/schema/judging'
import { revisions } from '../db/schema/lessons'
import { personNames } from '../db/schema/people'
import { pieceEvents, pieces } from '../db/schema/pieces'
import type { Actor } from './actor'
import { digestOf } from './digest'
import { found } from './refuse'
import type { SignOffRow } from './sign-offs'
import { readStanding } from './standings'
import { readWords } from './words'

/** A sign-off as it stands: for its holder, and for who may see pieces or records of the studio. */
export async function signOffView(db: Db, who: Actor, id: string): Promise<SignOffView> {
  const [row] = await db.select().from(signOffs).where(and(eq(signOffs.studioId, who.studioId), eq(signOffs.id, id)))
  const signOff = found(row)
  if (signOff.personId !== who.personId && !may(who.roles, 'see-pieces') && !may(who.roles, 'see-record')) found(null)
  const [revision] = await db.select({ title: revisions.title, number: revisions.number }).from(revisions).where(and(eq(revisions.studioId, who.studioId), eq(revisions.id, signOff.revisionId)))
  const beside = await db.select().from(signOffs).where(and(eq(signOffs.studioId, who.studioId), eq(signOffs.of, id))).orderBy(asc(signOffs.at), asc(signOffs.id))
  const rests = await piecesUnder(db, who.studioId, signOff)
  const standing = await readStanding(db, who.studioId, signOff.personId, signOff.lessonId)
  const words = await readWords(db, who.studioId, signOff.wordsId ? [signOff.wordsId] : [])
  return {
    id, person: signOff.personId, name: await nameThen(db, signOff.personId, signOff.personNameVersion), lesson: revision?.title ?? '', lessonId: signOff.lessonId, revision: revision?.number ?? 0,
    level: signOff.level, kind: signOff.kind, of: signOff.of, at: signOff.at.toISOString(), day: signOff.onDay, isInForce: standing?.signOffId === id, oneSignature: standing?.signOffId === id && standing.oneSignature,
    isSelf: signOff.personId === signOff.by, names: await Promise.all([signOff, ...beside.filter(one => one.id !== id)].map(one => nameUnder(db, one))), pieces: rests,
    joinedAfter: rests.reduce((sum, piece) => sum + piece.joinedAfter, 0), digest: signOff.digest,
    isWhole: await digestOf(db, who.studioId, rests.map(piece => piece.judgement)) === signOff.digest, words: signOff.wordsId ? words.get(signOff.wordsId) ?? null : null,
  }
}

/** The name a person had when the record was made. */
async function nameThen(db: Db, personId: string, version: number): Promise<string> {
  const [row] = await db.select({ name: personNames.name }).from(personNames).where(and(eq(personNames.personId, personId), eq(personNames.version, version)))
  return row?.name ?? 'A person no longer here'
}

async function nameUnder(db: Db, row: SignOffRow): Promise<NameUnder> {
  return { id: row.id, kind: row.kind, name: await nameThen(db, row.by, row.byNameVersion), level: row.level, byLevel: row.byLevel, at: row.at.toISOString() }
}

/** The judged pieces a sign-off rests on. What arrived after it was signed is counted and changes nothing. */
async function piecesUnder(db: Db, studioId: string, signOff: SignOffRow): Promise<SignOffPiece[]> {
  const rows = await db.select({ piece: pieces, judgement: judgements }).from(signOffPieces)
    .innerJoin(judgements, and(eq(judgements.studioId, signOffPieces.studioId), eq(judgements.id, signOffPieces.judgementId)))
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .where(and(eq(signOffPieces.studioId, studioId), eq(signOffPieces.signOffId, signOff.id))).orderBy(asc(judgements.at), asc(judgements.id))
  const joined = rows.length === 0
    ? []
    : await db.select({ piece: pieceEvents.pieceId, count: count() }).from(pieceEvents)
        .where(and(eq(pieceEvents.studioId, studioId), inArray(pieceEvents.pieceId, rows.map(row => row.piece.id)), gt(pieceEvents.receivedAt, signOff.at), ne(pieceEvents.kind, 'piece.judged')))
        .groupBy(pieceEvents.pieceId)
  return rows.map(({ piece, judgement }) => ({
    id: piece.id, label: piece.label, judgement: judgement.id, day: piece.finishedOn ?? '', seen: judgement.seen, n: judgement.n, joinedAfter: joined.find(one => one.piece === piece.id)?.count ?? 0,
  }))
}
