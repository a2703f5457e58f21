/** What the screen of the player asks for now; worked out from the fold and from nothing the screen remembers. */
import { evaluate } from '../lesson/figures'
import type { Ask, Check, Choice, Hold, Step } from '../lesson/schema'
import { choiceOrder, type State } from './machine'
import type { Turn } from './plan'
import { askKey, askOf, readingTaken, scopeAt, type SetOut, stepOf } from './set-out'

export type Need =
  | { kind: 'reading', at: number, reading: string }
  | { kind: 'photo', at: number }
  | { kind: 'check', at: number }
  | { kind: 'wait', at: number, until: string | null }

export type Place =
  | { kind: 'ask', turn: Turn, index: number, ask: Ask, hold: Hold }
  | { kind: 'witness', turn: Turn, hold: Hold | null }
  | { kind: 'step', turn: Turn }
  | { kind: 'closing' }
  | { kind: 'over', why: 'finished' | 'judged' | 'put-away' }
  | { kind: 'stopped' }

/** Where the piece stands, as the screen shows it. */
export function placeNow(set: SetOut, state: State): Place {
  if (state.status !== 'at-bench') return { kind: 'over', why: state.status === 'none' ? 'put-away' : state.status }
  if (state.stopped) return { kind: 'stopped' }
  const turn = state.place === null ? undefined : set.turns[set.at.get(state.place) ?? -1]
  if (!turn) return { kind: 'closing' }
  return held(set, state, turn) ?? { kind: 'step', turn }
}

function held(set: SetOut, state: State, turn: Turn): Place | null {
  if (state.released[turn.address] || turn.asks.length === 0) return null
  const index = turn.asks.findIndex((_, i) => !state.right[askKey(turn.address, i)])
  const planned = turn.asks[index]
  const step = stepOf(set, turn)
  if (planned) {
    const hold = step.holds[planned.hold]
    const ask = askOf(set, turn, index)
    return hold && ask ? { kind: 'ask', turn, index, ask, hold } : null
  }
  return turn.witness && state.witnessed[turn.address] === undefined ? { kind: 'witness', turn, hold: step.holds[turn.asks.at(-1)?.hold ?? 0] ?? null } : null
}

/** What a step still asks for before it is done, in the order it is asked: readings, photos, questions, waits. */
export function needsOf(set: SetOut, state: State, turn: Turn, now: number): Need[] {
  const step = stepOf(set, turn)
  const taken = state.photos.filter(photo => photo.turn === turn.address && photo.round === state.round && photo.for === 'step').length
  return [
    ...turn.readings.flatMap((at): Need[] => { const reading = step.readings[at]?.reading; return reading && !readingTaken(set, state, turn, reading) ? [{ kind: 'reading', at, reading }] : [] }),
    ...turn.photos.slice(taken).map((at): Need => ({ kind: 'photo', at })),
    ...turn.checks.flatMap((at): Need[] => state.checked[askKey(turn.address, at)] ? [] : [{ kind: 'check', at }]),
    ...turn.waits.flatMap((at): Need[] => { const until = state.waits[askKey(turn.address, at)] ?? null; return until !== null && Date.parse(until) <= now ? [] : [{ kind: 'wait', at, until }] }),
  ]
}

/** How long a wait is, in seconds; 0 where it has no length. */
export function waitSeconds(set: SetOut, turn: Turn, at: number): number {
  const wait = stepOf(set, turn).waits[at]
  const length = wait ? evaluate(wait.length, scopeAt(set, turn)) : null
  return length?.ok && typeof length.value.value === 'number' && Number.isFinite(length.value.value) ? Math.max(0, length.value.value) : 0
}

/** Choices as they are shown: drawn anew after each wrong answer, or as written. */
export function choicesShown(state: Pick<State, 'piece' | 'round'>, turn: string, misses: number, asked: Pick<Check, 'choices' | 'fixed'>): Choice[] {
  if (asked.fixed) return [...asked.choices]
  const order = choiceOrder(state, turn, misses, asked.choices.map(choice => choice.key))
  return order.flatMap(key => asked.choices.filter(choice => choice.key === key))
}

/** Of which repeat a turn is, in words: "link 5 of 7"; empty where nothing repeats. */
export function turnSays(set: SetOut, turn: Turn): string {
  const step = stepOf(set, turn)
  const part = set.lesson.parts.find(one => one.key === turn.part)
  const says: string[] = []
  if (part?.repeat && turn.partTurns > 1) says.push(`${part.say ?? 'number'} ${turn.partTurn} of ${turn.partTurns}`)
  if (step.repeat && turn.stepTurns > 1) says.push(`${step.say ?? 'number'} ${turn.stepTurn} of ${turn.stepTurns}`)
  return says.join(', ')
}

/** What stands along the wire: before each step with a hold its bead, then the step. `at` is the index in the plan. */
export interface WireThing { kind: 'hold' | 'step', at: number, done: boolean, here: boolean }
export function wireOf(set: SetOut, state: State, at: number): WireThing[] {
  const placed = state.place === null ? set.turns.length : set.at.get(state.place) ?? 0
  return set.turns.flatMap((turn, i): WireThing[] => {
    const isPassed = i < placed || (i === placed && held(set, state, turn) === null)
    const step: WireThing = { kind: 'step', at: i, done: i < placed, here: i === at && (i !== placed || isPassed) }
    return turn.asks.length > 0 ? [{ kind: 'hold', at: i, done: isPassed, here: i === at && i === placed && !isPassed }, step] : [step]
  })
}

/** The turns with a hold that an instructor must look at, ahead of the piece. */
export const witnessAhead = (turns: readonly Turn[]): Turn[] => turns.filter(turn => turn.witness)

export const drawsAnything = (step: Step): boolean => step.drawings.length > 0 || step.pictures.length > 0
