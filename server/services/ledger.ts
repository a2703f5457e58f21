import { and, asc, eq, gt, max } from 'drizzle-orm'
import { canonical, sha256 } from '../../shared/lesson/canonical'
import type { BenchEvent, EventKind, StoredEvent } from '../../shared/bench/events'
import { add, begin, type Folded, setOut, type Verdict } from '../../shared/bench/machine'
import { MACHINE, type State } from '../../shared/bench/state'
import type { Facts } from '../../shared/bench/may'
import type { Lesson } from '../../shared/lesson/schema'
import { shaOfEvent } from '../../shared/bench/events'
import type { DbOrTx, Tx } from '../db/client'
import { pieceEvents, pieces, setAsideEvents } from '../db/schema/pieces'
import { compiledLesson } from './compiled'

/** A piece locked for one transaction: its row, its lesson, its state, and what was added. */
export interface Ledger {
  studioId: string
  row: typeof pieces.$inferSelect
  lesson: Lesson
  folded: Folded
  added: StoredEvent[]
  /** Rows of what was added, not yet written: settle() writes them in one statement. */
  rows: (typeof pieceEvents.$inferInsert)[]
}

export const FIRST_HEAD = '0'.repeat(64)
export type NewPiece = Omit<typeof pieces.$inferSelect, 'n' | 'head' | 'state' | 'machine'>

/** Locks a piece and folds it, or null when the studio has none of that id. */
export async function openLedger(tx: Tx, studioId: string, pieceId: string): Promise<Ledger | null> {
  const [row] = await tx.select().from(pieces).where(and(eq(pieces.studioId, studioId), eq(pieces.id, pieceId))).for('update')
  if (!row) return null
  const lesson = await compiledLesson(tx, studioId, row.revisionId)
  return { studioId, row, lesson, folded: await foldRow(tx, row, lesson), added: [], rows: [] }
}

/** The ledger of a piece that begins with its first event. */
export async function newLedger(tx: Tx, piece: NewPiece, lesson: Lesson): Promise<Ledger> {
  const row = { ...piece, n: 0, head: FIRST_HEAD, state: {}, machine: 0 }
  await tx.insert(pieces).values(row)
  return { studioId: piece.studioId, row, lesson, folded: begin(piece.id), added: [], rows: [] }
}

/** The fold of a piece: the kept state when it is of this machine, else all its events again. */
export async function foldRow(db: DbOrTx, row: typeof pieces.$inferSelect, lesson: Lesson): Promise<Folded> {
  if (row.machine === MACHINE && isState(row.state) && row.state.start) return { state: row.state, set: setOut(lesson, row.state.start), refused: [] }
  const folded = begin(row.id)
  for (const event of await storedEvents(db, row.studioId, row.id)) add(lesson, folded, event)
  return folded
}

/** A kept state was written by settle() under the same machine number; it is plain JSON. */
export const isState = (value: unknown): value is State => typeof value === 'object' && value !== null && 'status' in value

export interface Received { event: BenchEvent, receivedAt: Date, clockOffMs: number }

/** Asks the machine and, where it says yes, gives the event the next number and rolls the head. settle() stores it. */
export function write(ledger: Ledger, { event, receivedAt, clockOffMs }: Received, facts: Facts = {}): Verdict {
  const verdict = add(ledger.lesson, ledger.folded, event, facts)
  if (!verdict.ok) return verdict
  const sha = shaOfEvent(event)
  const n = ledger.row.n + 1
  ledger.rows.push({
    studioId: ledger.studioId, pieceId: event.piece, n, id: event.id, tablet: event.tablet, seq: event.seq, round: event.round, actor: event.actor, kind: event.kind, v: event.v,
    at: new Date(event.at), since: event.since, receivedAt, clockOffMs, late: verdict.late, sha, body: canonical(event.body),
  })
  ledger.row.n = n
  ledger.row.head = sha256(ledger.row.head + sha)
  ledger.added.push({ ...event, n, late: verdict.late })
  return verdict
}

/** Stored events of a piece after number `after`, in order. */
export async function storedEvents(db: DbOrTx, studioId: string, pieceId: string, after = 0): Promise<StoredEvent[]> {
  const rows = await db.select().from(pieceEvents)
    .where(and(eq(pieceEvents.studioId, studioId), eq(pieceEvents.pieceId, pieceId), gt(pieceEvents.n, after))).orderBy(asc(pieceEvents.n))
  return rows.map(row => eventOfRow(row))
}

function eventOfRow(row: typeof pieceEvents.$inferSelect): StoredEvent {
  // Every row went through the strict schema of its kind before it was stored.
  return {
    id: row.id, piece: row.pieceId, round: row.round, tablet: row.tablet, seq: row.seq, actor: row.actor, kind: row.kind as EventKind, v: 1, at: row.at.toISOString(),
    since: row.since, body: JSON.parse(row.body), n: row.n, late: row.late,
  } as StoredEvent
}

/** The chain of one piece taken again from its events. True when every hash and the head agree. */
export async function verifyPiece(db: DbOrTx, studioId: string, pieceId: string): Promise<boolean> {
  const [row] = await db.select({ head: pieces.head, n: pieces.n }).from(pieces).where(and(eq(pieces.studioId, studioId), eq(pieces.id, pieceId)))
  const rows = await db.select().from(pieceEvents).where(and(eq(pieceEvents.studioId, studioId), eq(pieceEvents.pieceId, pieceId))).orderBy(asc(pieceEvents.n))
  let head = FIRST_HEAD
  for (const [index, stored] of rows.entries()) {
    if (stored.n !== index + 1 || shaOfEvent(eventOfRow(stored)) !== stored.sha) return false
    head = sha256(head + stored.sha)
  }
  return row !== undefined && row.n === rows.length && row.head === head
}

/** The last seq a tablet has used for a piece, taken or set aside. */
export async function lastSeq(tx: Tx, studioId: string, pieceId: string, tablet: string): Promise<number> {
  const [stored] = await tx.select({ seq: max(pieceEvents.seq) }).from(pieceEvents)
    .where(and(eq(pieceEvents.studioId, studioId), eq(pieceEvents.pieceId, pieceId), eq(pieceEvents.tablet, tablet)))
  const [aside] = await tx.select({ seq: max(setAsideEvents.seq) }).from(setAsideEvents)
    .where(and(eq(setAsideEvents.studioId, studioId), eq(setAsideEvents.pieceId, pieceId), eq(setAsideEvents.tablet, tablet)))
  return Math.max(stored?.seq ?? 0, aside?.seq ?? 0)
}
