import { and, eq, inArray, isNull, sql } from 'drizzle-orm'
import { ulid } from 'ulid'
import { dayIn } from '../../shared/bench/day'
import type { StoredEvent } from '../../shared/bench/events'
import { MACHINE, type State } from '../../shared/bench/state'
import type { Tx } from '../db/client'
import { looks, photos, pieceEvents, pieces, readings } from '../db/schema/pieces'
import { studios } from '../db/schema/studio'
import type { Ledger } from './ledger'
import { refreshStanding } from './standings'

/** Writes what follows from the events added: the piece's row, readings, photos, looks, and the standing. */
export async function settle(tx: Tx, ledger: Ledger, clockOffMs: number, now: Date): Promise<void> {
  if (ledger.rows.length > 0) await tx.insert(pieceEvents).values(ledger.rows.splice(0))
  for (const event of ledger.added) {
    await projectReading(tx, ledger, event)
    await projectPhoto(tx, ledger, event)
    await projectLook(tx, ledger, event, now)
  }
  const { state } = ledger.folded
  const finished = finishOf(state, clockOffMs, now)
  const status = state.status === 'none' ? 'at-bench' : state.status
  const patch = {
    status, round: state.round, place: state.place, turnsDone: state.turnsDone, n: ledger.row.n, head: ledger.row.head, state, machine: MACHINE,
    finishedAt: finished, finishedOn: finished ? await dayOf(tx, ledger, finished) : null,
    waitingSince: status === 'finished' ? ledger.row.waitingSince ?? now : null,
  }
  await tx.update(pieces).set(patch).where(and(eq(pieces.studioId, ledger.studioId), eq(pieces.id, ledger.row.id)))
  if (status !== 'at-bench') {
    await tx.update(looks).set({ givenAt: now }).where(and(eq(looks.studioId, ledger.studioId), eq(looks.pieceId, ledger.row.id), isNull(looks.givenAt)))
  }
  Object.assign(ledger.row, patch)
  await refreshStanding(tx, ledger.studioId, ledger.row.personId, ledger.row.lessonId)
}

/** When it was finished by the server's clock: the tablet's moment put right, and never later than its arrival. */
function finishOf(state: State, clockOffMs: number, now: Date): Date | null {
  if (!state.finishedAt) return null
  return new Date(Math.min(new Date(state.finishedAt).getTime() + clockOffMs, now.getTime()))
}

/** The day is fixed on the row by the first finish of a round and stays, whatever arrives later. */
async function dayOf(tx: Tx, ledger: Ledger, finished: Date): Promise<string> {
  if (ledger.row.finishedOn && ledger.row.status !== 'at-bench') return ledger.row.finishedOn
  const [studio] = await tx.select({ zone: studios.zone }).from(studios).where(eq(studios.id, ledger.studioId))
  return dayIn(studio?.zone ?? 'UTC', finished)
}

async function projectReading(tx: Tx, ledger: Ledger, event: StoredEvent): Promise<void> {
  const taken = ledger.folded.state.readings.find(reading => reading.id === event.id)
  if (!taken) return
  await tx.insert(readings).values(taken.values.map((value, place) => ({
    studioId: ledger.studioId, id: ulid(), pieceId: event.piece, n: event.n, place, turn: taken.turn, reading: taken.reading, value, unit: taken.unit,
    typed: taken.typed[place] ?? value, outside: !taken.right,
  })))
}

async function projectPhoto(tx: Tx, ledger: Ledger, event: StoredEvent): Promise<void> {
  if (event.kind !== 'photo.taken') return
  const { photo, turn, for: why, sha256, bytes, width, height } = event.body
  await tx.insert(photos).values({ studioId: ledger.studioId, id: photo, pieceId: event.piece, turn, for: why, claimedSha: sha256, state: 'awaited', bytes, width, height })
    .onDuplicateKeyUpdate({ set: { id: sql`id` } })
}

async function projectLook(tx: Tx, ledger: Ledger, event: StoredEvent, now: Date): Promise<void> {
  if (event.late) return
  if (event.kind === 'look.asked') {
    await tx.insert(looks).values({ studioId: ledger.studioId, id: event.id, pieceId: event.piece, turn: event.body.turn, about: event.body.about, askedAt: now })
  }
  if (event.kind === 'look.given' || event.kind === 'look.let-go') {
    await tx.update(looks).set({ givenAt: now, by: event.kind === 'look.given' ? event.actor : null })
      .where(and(eq(looks.studioId, ledger.studioId), eq(looks.pieceId, event.piece), isNull(looks.givenAt)))
  }
}

/** Photos of a piece that are still on a tablet. */
export async function photosAwaited(tx: Tx, studioId: string, pieceIds: readonly string[]): Promise<number> {
  if (pieceIds.length === 0) return 0
  const rows = await tx.select({ id: photos.id }).from(photos)
    .where(and(eq(photos.studioId, studioId), inArray(photos.pieceId, [...pieceIds]), eq(photos.state, 'awaited')))
  return rows.length
}
