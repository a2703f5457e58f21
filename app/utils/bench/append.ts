/** Adds an act of the maker to what the tablet keeps: asked of the machine and numbered inside one transaction. */
import { type AnyEvent, type BenchEvent, type Bodies, EVENT_VERSION, type MakerKind, readEvent } from '#shared/bench/events'
import { fold, may, setOut, type State } from '#shared/bench/machine'
import { emptyState } from '#shared/bench/state'
import type { BenchDb, KeptEvent, KeptPhoto, KeptPiece } from './db'

export interface Act<K extends MakerKind = MakerKind> { id: string, kind: K, body: Bodies[K] }
export interface By { tablet: string, actor: string, at: string, /** Milliseconds since the act before; null after a reload. */ since: number | null }
export type Appended = { ok: true, event: BenchEvent } | { ok: false, says: string }

/** Events as the machine takes them: what was set aside is no part of the piece. */
export const asEvents = (kept: readonly KeptEvent[]): AnyEvent[] =>
  kept.filter(one => one.aside === null).map(one => one.n === null ? one.event : { ...one.event, n: one.n, late: one.late })

const OVER_SAYS: Record<string, string> = {
  'finished': 'This piece is finished.', 'judged': 'This piece is judged.', 'put-away': 'This piece was put away.',
}

/** Why a maker's act would come too late or be stopped, or null. */
function closed(state: State, kind: MakerKind): string | null {
  if (state.status === 'none') return null
  if (state.status !== 'at-bench') return OVER_SAYS[state.status] ?? null
  return state.stopped && kind !== 'piece.put-away' && kind !== 'look.asked' ? 'This piece is stopped. Ask an instructor.' : null
}

/**
 * Keeps one act, with the photo it tells of, in one transaction. A second page on this tablet is asked against the same
 * stored events, so the same thing is not done twice, and `seq` has no gap.
 */
export async function append<K extends MakerKind>(db: BenchDb, piece: KeptPiece, act: Act<K>, by: By, photo?: KeptPhoto): Promise<Appended> {
  const tx = db.transaction(['pieces', 'events', 'photos'], 'readwrite', { durability: 'strict' })
  const events = tx.objectStore('events')
  const kept = await events.index('piece').getAll(piece.id)
  const already = kept.find(one => one.id === act.id)
  if (already) {
    await tx.done
    return { ok: true, event: already.event }
  }
  const { state, set } = fold(piece.compiled, piece.id, asEvents(kept))
  const seq = kept.reduce((last, one) => one.tablet === by.tablet ? Math.max(last, one.seq) : last, 0) + 1
  const round = act.kind === 'piece.started' ? act.id : state.round
  const event = readEvent({ id: act.id, piece: piece.id, round, tablet: by.tablet, seq, actor: by.actor, kind: act.kind, v: EVENT_VERSION, at: by.at, since: by.since, body: act.body })
  const says = event ? refusal(piece, state, set, event, act.kind) : 'This cannot be kept. Go back a step and try again.'
  if (!event || says !== null) {
    tx.abort()
    await tx.done.catch(() => undefined)
    return { ok: false, says: says ?? '' }
  }
  if (act.kind === 'piece.started') await tx.objectStore('pieces').put(piece)
  await events.put({ id: event.id, piece: piece.id, tablet: by.tablet, seq, actor: by.actor, event, n: null, late: false, aside: null })
  if (photo) await tx.objectStore('photos').put(photo)
  await tx.done
  return { ok: true, event }
}

function refusal(piece: KeptPiece, state: State, set: ReturnType<typeof setOut>, event: BenchEvent, kind: MakerKind): string | null {
  if (event.kind === 'piece.started') {
    if (state.status !== 'none') return 'This piece has begun already.'
    return setOut(piece.compiled, event.body) ? null : 'With these sizes there are no steps to do.'
  }
  const shut = closed(state, kind)
  if (shut) return shut
  const verdict = may(set, state.status === 'none' ? emptyState(piece.id) : state, event)
  return verdict.ok ? null : verdict.says
}
