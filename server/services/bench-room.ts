import { and, asc, count, eq, inArray, isNull, lt, max } from 'drizzle-orm'
import type { BenchRoom, LookLine, RoomRow } from '../../shared/types/bench'
import type { Db, DbOrTx } from '../db/client'
import { revisions } from '../db/schema/lessons'
import { looks, pieceEvents, pieces } from '../db/schema/pieces'
import { classPeople } from '../db/schema/studio'
import type { Actor } from './actor'
import { inHand } from './bench-words'
import { compiledLesson } from './compiled'
import { isState } from './ledger'
import { currentNames, nameIn } from './names'
import { visiblePiece } from './piece-view'

/** The people who share a class with someone; null where they are in no class, which means everyone. */
async function classmates(db: DbOrTx, who: Actor): Promise<string[] | null> {
  const own = await db.select({ classId: classPeople.classId }).from(classPeople).where(and(eq(classPeople.studioId, who.studioId), eq(classPeople.personId, who.personId)))
  if (own.length === 0) return null
  const rows = await db.select({ personId: classPeople.personId }).from(classPeople).where(and(eq(classPeople.studioId, who.studioId), inArray(classPeople.classId, own.map(row => row.classId))))
  return [...new Set(rows.map(row => row.personId))]
}

async function atBench(db: DbOrTx, who: Actor) {
  const makers = await classmates(db, who)
  return await db.select({
    id: pieces.id, label: pieces.label, personId: pieces.personId, revisionId: pieces.revisionId, title: revisions.title, turnsDone: pieces.turnsDone, turnsAll: pieces.turnsAll, state: pieces.state, startedAt: pieces.startedAt,
  }).from(pieces).innerJoin(revisions, and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId)))
    .where(and(eq(pieces.studioId, who.studioId), eq(pieces.status, 'at-bench'), makers ? inArray(pieces.personId, makers) : undefined)).orderBy(asc(pieces.startedAt), asc(pieces.id))
}

/** Pieces at the bench of an instructor's classes (of the studio, for who is in none). What waits for them stands first, oldest first. */
export async function benchRoom(db: Db, who: Actor, now: Date): Promise<BenchRoom> {
  const rows = await atBench(db, who)
  const ids = rows.map(row => row.id)
  const heard = ids.length === 0 ? [] : await db.select({ pieceId: pieceEvents.pieceId, at: max(pieceEvents.receivedAt) }).from(pieceEvents)
    .where(and(eq(pieceEvents.studioId, who.studioId), inArray(pieceEvents.pieceId, ids))).groupBy(pieceEvents.pieceId)
  const asked = ids.length === 0 ? [] : await db.select().from(looks).where(and(eq(looks.studioId, who.studioId), inArray(looks.pieceId, ids), isNull(looks.givenAt))).orderBy(asc(looks.askedAt))
  const names = await currentNames(db, rows.map(row => row.personId))
  const shown: RoomRow[] = []
  for (const row of rows) {
    const state = isState(row.state) ? row.state : null
    const { step, hold } = state ? inHand(await compiledLesson(db, who.studioId, row.revisionId), state) : { step: null, hold: null }
    const look = asked.find(one => one.pieceId === row.id)
    shown.push({
      piece: row.id, label: row.label, maker: nameIn(names, row.personId), makerId: row.personId, lesson: row.title, step, turnsDone: row.turnsDone, turnsAll: row.turnsAll,
      at: (heard.find(one => one.pieceId === row.id)?.at ?? row.startedAt).toISOString(), look: look ? { id: look.id, about: look.about, at: look.askedAt.toISOString() } : null,
      hold, stopped: Boolean(state?.stopped),
    })
  }
  const waits = (row: RoomRow): string => row.look?.at ?? (row.hold?.witness ? row.at : '9')
  return { now: now.toISOString(), rows: shown.sort((a, b) => waits(a) < waits(b) ? -1 : waits(a) > waits(b) ? 1 : a.at < b.at ? 1 : -1) }
}

/** How many looks were asked for before this piece's. */
export async function lookLine(db: Db, who: Actor, pieceId: string): Promise<LookLine> {
  await visiblePiece(db, who, pieceId)
  const waiting = and(eq(looks.studioId, who.studioId), isNull(looks.givenAt))
  const [own] = await db.select({ at: looks.askedAt }).from(looks).where(and(waiting, eq(looks.pieceId, pieceId))).orderBy(asc(looks.askedAt)).limit(1)
  if (!own) return { asked: false, before: 0 }
  const [before] = await db.select({ count: count() }).from(looks).where(and(waiting, lt(looks.askedAt, own.at)))
  return { asked: true, before: before?.count ?? 0 }
}
