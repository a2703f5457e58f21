/**
 * The machine of the bench: where a piece stands is a fold of its events and nothing else. The same code runs in the
 * player and on the server, so whatever an honest tablet allowed, the server takes.
 */
import { sha256 } from '../lesson/canonical'
import type { Lesson } from '../lesson/schema'
import { apply } from './apply'
import { type AnyEvent, type EventOf, isMakerKind } from './events'
import { type Facts, may, no, type Verdict } from './may'
import { type Reason, REASON_SAYS } from './reasons'
import { type SetOut, setOut } from './set-out'
import { emptyState, type State } from './state'

export { plan, planSha } from './plan'
export type { Turn } from './plan'
export { may } from './may'
export type { Facts, Verdict } from './may'
export type { Reason } from './reasons'
export { askOf, holdPassed, missing, newestSamples, placeIndex, readingTaken, scopeAt, setOut, stepOf } from './set-out'
export type { SetOut } from './set-out'
export type { State } from './state'

/** A pause longer than this is counted as away and not as work. */
const AWAY_MS = 10 * 60_000

/** The order in which choices are shown, drawn from the piece, round, turn and misses, so that "the second one" cannot be learned. */
export function choiceOrder(state: Pick<State, 'piece' | 'round'>, turn: string, misses: number, keys: readonly string[]): string[] {
  const draw = (key: string) => sha256(`${state.piece} ${state.round} ${turn} ${misses} ${key}`)
  return [...keys].sort((a, b) => draw(a) < draw(b) ? -1 : 1)
}

/** Three misses on one hold: not blocked, but the piece counts for nothing above level 2. */
export const MISSES_THAT_COUNT = 3
export const manyMisses = (state: State): string[] => Object.entries(state.misses).filter(([, count]) => count >= MISSES_THAT_COUNT).map(([turn]) => turn)

export interface Folded { state: State, set: SetOut | null, refused: { id: string, reason: Reason, says: string }[] }

/** Begins a fold, or goes on with a kept one. */
export function begin(piece: string): Folded {
  return { state: emptyState(piece), set: null, refused: [] }
}

/** Adds one event to a fold; what may not be is listed and skipped. Returns the verdict. */
export function add(lesson: Lesson, folded: Folded, event: AnyEvent, facts: Facts = {}): Verdict {
  const { state } = folded
  const verdict = may(folded.set, state, event, facts)
  if (!verdict.ok) {
    folded.refused.push({ id: event.id, reason: verdict.reason, says: verdict.says })
    return verdict
  }
  if (event.kind === 'piece.started') return start(lesson, folded, event)
  const { set } = folded
  if (!set) return verdict
  const at = state.place
  if (verdict.late) state.late.push(event.id)
  else {
    if (state.stopped && isMakerKind(event.kind)) state.whileStopped.push(event.id)
    apply(set, state, event)
  }
  if (at !== null && event.since !== null && event.since <= AWAY_MS && isMakerKind(event.kind)) state.spent[at] = (state.spent[at] ?? 0) + event.since
  return verdict
}

function start(lesson: Lesson, folded: Folded, event: EventOf<'piece.started'>): Verdict {
  const set = setOut(lesson, event.body)
  if (!set) {
    folded.refused.push({ id: event.id, reason: 'no-plan', says: REASON_SAYS['no-plan'] })
    return no('no-plan')
  }
  folded.set = set
  Object.assign(folded.state, { status: 'at-bench', maker: event.actor, start: event.body, startedAt: event.at, round: event.id, place: set.turns[0]?.address ?? null } satisfies Partial<State>)
  return { ok: true, late: false }
}

/** Numbered events by number, then those that have none yet by tablet and seq; repeats dropped by id. */
export function inOrder(events: readonly AnyEvent[]): AnyEvent[] {
  const byId = new Map<string, AnyEvent>()
  for (const event of events) {
    const known = byId.get(event.id)
    if (!known || (known.n === undefined && event.n !== undefined)) byId.set(event.id, event)
  }
  return [...byId.values()].sort((a, b) => {
    if (a.n !== undefined && b.n !== undefined) return a.n - b.n
    if (a.n !== undefined) return -1
    if (b.n !== undefined) return 1
    return a.tablet < b.tablet ? -1 : a.tablet > b.tablet ? 1 : a.seq - b.seq
  })
}

/** Where a piece stands after these events, in whatever order and however often they came. */
export function fold(lesson: Lesson, piece: string, events: readonly AnyEvent[]): Folded {
  const folded = begin(piece)
  for (const event of inOrder(events)) add(lesson, folded, event)
  return folded
}
