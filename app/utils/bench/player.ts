/** What the player's screen shows beside the piece itself; pure, and tested without a screen. */
import type { AnyEvent } from '#shared/bench/events'
import { needsOf, type Need } from '#shared/bench/screen'
import { placeIndex, type SetOut, type State, stepOf, type Turn } from '#shared/bench/machine'
import type { Inline, Step } from '#shared/lesson/schema'

export interface Wait { until: string, why: readonly Inline[] | null }

/** Is what a step asked for there now? */
export function isMet(set: SetOut, state: State, turn: Turn, need: Need, now: number): boolean {
  return !needsOf(set, state, turn, now).some(one => one.kind === need.kind && one.at === need.at)
}

/** Where Back leads from here: a turn to look at, or null where there is none. */
export function backFrom(set: SetOut, state: State, viewing: number | null): number | null {
  const at = (viewing ?? placeIndex(set, state)) - 1
  return at >= 0 && set.turns.length > 0 ? at : null
}

/** Where Next leads while looking back: a turn to look at, or null at the place. */
export function onFrom(set: SetOut, state: State, viewing: number): number | null {
  return viewing + 1 >= placeIndex(set, state) ? null : viewing + 1
}

/** How far back the work is looked for that a hold asks about. */
const LOOKED_BACK = 4

/** The last step before a turn that shows the work: its drawing or its picture. */
export function lastShown(set: SetOut, at: number): { turn: Turn, step: Step } | null {
  for (let i = at - 1; i >= Math.max(0, at - LOOKED_BACK); i--) {
    const turn = set.turns[i]
    const step = turn ? stepOf(set, turn) : null
    if (turn && step && (turn.drawings.length > 0 || step.pictures.length > 0)) return { turn, step }
  }
  return null
}

/** Has a step nothing to say or show of its own beside its title? */
export const saysNothing = (step: Step): boolean => step.text.length === 0 && step.safety.length === 0 && step.pictures.length === 0 && step.drawings.length === 0 && step.feel.length === 0

/** Where a piece was put away, when that was not here. */
export function putAwaySays(events: readonly AnyEvent[], tablet: string): string {
  const away = events.find(event => event.kind === 'piece.put-away')
  if (!away || away.tablet === tablet) return ''
  return `It was put away on another tablet at ${new Date(away.at).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' })}.`
}

const NEED_SAYS: Record<Need['kind'], string> = { reading: 'then: measure it', photo: 'then: a photo', check: 'then: a question', wait: 'then: it rests' }
export const needSays = (need: Need): string => NEED_SAYS[need.kind]

/** Bytes of a blob and their hash, as an event tells of them. */
export async function bytesOf(blob: Blob): Promise<Uint8Array> {
  return new Uint8Array(await blob.arrayBuffer())
}
