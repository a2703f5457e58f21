import { ulid } from 'ulid'
import { and, eq } from 'drizzle-orm'
import { BODIES, type Bodies, type BenchEvent, EVENT_VERSION, type InstructorKind } from '../../shared/bench/events'
import type { Tx } from '../db/client'
import { pieceEvents } from '../db/schema/pieces'
import type { Actor } from './actor'
import { lastSeq, type Ledger, openLedger, write } from './ledger'
import { found, refuse } from './refuse'
import { settle } from './settle'

export interface Act<K extends InstructorKind> {
  pieceId: string
  /** Id of the instructor's own session: their "tablet". */
  tablet: string
  /** Made on the page: a repeat of the same id changes nothing. */
  id: string
  kind: K
  body: Bodies[K]
}

/**
 * An instructor's act on a piece, as one more event of it: numbered, hashed, folded, and the piece's row brought up to date.
 * 404 for a piece the studio has not; 422 with the reason where the machine says no. The same id again changes nothing.
 */
export async function actOnPiece<K extends InstructorKind>(tx: Tx, who: Actor, act: Act<K>, now: Date): Promise<Ledger> {
  const ledger = found(await openLedger(tx, who.studioId, act.pieceId))
  const [there] = await tx.select({ kind: pieceEvents.kind, piece: pieceEvents.pieceId }).from(pieceEvents).where(and(eq(pieceEvents.studioId, who.studioId), eq(pieceEvents.id, act.id)))
  if (there) {
    if (there.piece !== act.pieceId || there.kind !== act.kind) refuse(409, 'This act was made before, as another one. Open the page again.')
    return ledger
  }
  await writeAct(tx, ledger, who.personId, act, now, who.roles.includes('instructor'))
  await settle(tx, ledger, 0, now)
  return ledger
}

/** Was this act taken before? A page sends it again when it did not hear the answer. */
export async function isDone(tx: Tx, studioId: string, id: string): Promise<boolean> {
  const rows = await tx.select({ n: pieceEvents.n }).from(pieceEvents).where(and(eq(pieceEvents.studioId, studioId), eq(pieceEvents.id, id)))
  return rows.length > 0
}

async function writeAct<K extends InstructorKind>(tx: Tx, ledger: Ledger, actor: string, act: Act<K>, now: Date, instructor: boolean): Promise<void> {
  const seq = await lastSeq(tx, ledger.studioId, act.pieceId, act.tablet) + 1
  const event = {
    id: act.id, piece: act.pieceId, round: ledger.folded.state.round, tablet: act.tablet, seq, actor, kind: act.kind, v: EVENT_VERSION, at: now.toISOString(), since: null,
    body: BODIES[act.kind].parse(act.body),
    // The body was parsed by the schema of its kind, which the union cannot follow.
  } as unknown as BenchEvent
  const verdict = write(ledger, { event, receivedAt: now, clockOffMs: 0 }, { instructor })
  if (!verdict.ok) refuse(422, verdict.says, { reason: verdict.reason })
}

/** A lesson withdrawn for danger stops a piece of it as soon as it arrives, on the word of whoever withdrew it. */
export async function stopForStudio(tx: Tx, ledger: Ledger, by: string, now: Date): Promise<void> {
  const act: Act<'stop.called'> = { pieceId: ledger.row.id, tablet: ulid(now.getTime()), id: ulid(now.getTime()), kind: 'stop.called', body: { why: 'lesson-withdrawn', words: null } }
  await writeAct(tx, ledger, by, act, now, true)
}
