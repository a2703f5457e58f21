import { and, asc, eq, inArray, isNull } from 'drizzle-orm'
import { maySign, NOTHING_HELD, type Pair } from '../../shared/judging/signer'
import type { AskedRow, LookRow, Looks } from '../../shared/types/judging'
import type { DbOrTx } from '../db/client'
import { revisions } from '../db/schema/lessons'
import { looks, photos, pieces } from '../db/schema/pieces'
import type { Actor } from './actor'
import { heldBy, tiesOf, todayOf } from './judging-facts'
import { isState } from './ledger'
import { currentNames, nameIn } from './names'
import { countToSign } from './to-sign'

const ofRevision = and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId))

/** When the last of a piece's waits is over, while one is not. Clocks of tablets are only evidence: it is a place in a list, not a lock. */
export function restsUntil(state: unknown, now: Date): string | null {
  const waits = isState(state) ? Object.values(state.waits) : []
  const last = waits.reduce((late, until) => until > late ? until : late, '')
  return last !== '' && new Date(last) > now ? last : null
}

async function finishedPieces(db: DbOrTx, studioId: string) {
  return await db.select({
    id: pieces.id, label: pieces.label, personId: pieces.personId, lessonId: pieces.lessonId, title: revisions.title, waitingSince: pieces.waitingSince, finishedAt: pieces.finishedAt, state: pieces.state,
  }).from(pieces).innerJoin(revisions, ofRevision)
    .where(and(eq(pieces.studioId, studioId), eq(pieces.status, 'finished'))).orderBy(asc(pieces.waitingSince), asc(pieces.id))
}

async function askedLooks(db: DbOrTx, studioId: string) {
  return await db.select({
    look: looks.id, about: looks.about, turn: looks.turn, at: looks.askedAt, piece: pieces.id, label: pieces.label, personId: pieces.personId, title: revisions.title,
  }).from(looks).innerJoin(pieces, and(eq(pieces.studioId, looks.studioId), eq(pieces.id, looks.pieceId))).innerJoin(revisions, ofRevision)
    .where(and(eq(looks.studioId, studioId), isNull(looks.givenAt))).orderBy(asc(looks.askedAt), asc(looks.id))
}

/** The newest held photo of each piece. */
async function thumbs(db: DbOrTx, studioId: string, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map()
  const rows = await db.select({ id: photos.id, pieceId: photos.pieceId }).from(photos)
    .where(and(eq(photos.studioId, studioId), inArray(photos.pieceId, [...ids]), eq(photos.state, 'held'))).orderBy(asc(photos.id))
  return new Map(rows.map(row => [row.pieceId, row.id]))
}

/** Everything that waits for an instructor: asked at the bench, finished in a bag, and resting. Oldest first. */
export async function listLooks(db: DbOrTx, who: Actor, now: Date): Promise<Looks> {
  const [finished, asked, { settings, today }] = [await finishedPieces(db, who.studioId), await askedLooks(db, who.studioId), await todayOf(db, who.studioId, now)]
  const [held, ties, names] = [await heldBy(db, who.studioId, who.personId), await tiesOf(db, who.studioId, who.personId), await currentNames(db, [...finished, ...asked].map(row => row.personId))]
  const photo = await thumbs(db, who.studioId, finished.map(row => row.id))
  const rowOf = (row: typeof finished[number], at: string): LookRow => {
    const maker = nameIn(names, row.personId)
    const pair: Pair = {
      settings, today, tie: ties.get(row.personId) ?? null, maker: { personId: row.personId, name: maker.split(' ')[0] ?? maker },
      signer: { personId: who.personId, roles: who.roles, held: held.get(row.lessonId) ?? NOTHING_HELD },
    }
    return { piece: row.id, label: row.label, maker, makerId: row.personId, lesson: row.title, at, mayYou: maySign(pair), photo: photo.get(row.id) ?? null }
  }
  const rests = finished.map(row => ({ row, until: restsUntil(row.state, now) }))
  const counts = await countToSign(db, who, now)
  return {
    now: now.toISOString(),
    asked: asked.map(({ piece, label, personId, title, look, about, turn, at }): AskedRow => ({ piece, label, maker: nameIn(names, personId), makerId: personId, lesson: title, at: at.toISOString(), look, about, turn })),
    waiting: rests.filter(one => one.until === null).map(({ row }) => rowOf(row, (row.waitingSince ?? row.finishedAt ?? now).toISOString())),
    resting: rests.flatMap(({ row, until }) => until === null ? [] : [rowOf(row, until)]).sort((a, b) => a.at < b.at ? -1 : 1),
    toSign: counts.toSign, secondNames: counts.secondNames,
  }
}

/** How many wait for an instructor now, resting pieces left out. */
export async function countLooks(db: DbOrTx, studioId: string, now: Date): Promise<number> {
  const [finished, asked] = [await finishedPieces(db, studioId), await askedLooks(db, studioId)]
  return finished.filter(row => restsUntil(row.state, now) === null).length + asked.length
}
