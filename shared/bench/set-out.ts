/** A lesson set out for one piece, and what can be asked of it and its state. */
import type { Scope } from '../lesson/figures'
import type { Ask, Lesson, Step } from '../lesson/schema'
import { isRight, isWithin, limitsOf } from './answers'
import type { EventOf, PieceStarted } from './events'
import { plan, type Turn } from './plan'
import { scopeOf } from './scope'
import type { Reason } from './reasons'
import type { State } from './state'

/** A lesson set out for one piece: its turns, and how to find one. */
export interface SetOut { lesson: Lesson, start: PieceStarted, turns: Turn[], at: Map<string, number>, steps: Map<string, Step>, scope: Scope }

/** Sets a lesson out for a piece, or null when no plan can be made from what was told. */
export function setOut(lesson: Lesson, start: PieceStarted): SetOut | null {
  const planned = plan(lesson, start)
  if (!planned.ok) return null
  const steps = new Map(lesson.parts.flatMap(part => part.steps.map(step => [step.key, step] as const)))
  return { lesson, start, turns: planned.turns, at: new Map(planned.turns.map((turn, i) => [turn.address, i])), steps, scope: scopeOf(lesson, start) }
}

export const askKey = (turn: string, ask: number): string => `${turn}#${ask}`
/** Index of the place in the plan; the number of turns when all is done. */
export const placeIndex = (set: SetOut, state: State): number => state.place === null ? set.turns.length : set.at.get(state.place) ?? set.turns.length

export function stepOf(set: SetOut, turn: Turn): Step {
  const step = set.steps.get(turn.step)
  if (!step) throw new Error(`The plan names a step the lesson has not: ${turn.step}`)
  return step
}

/** The names an expression in this turn may use, `turn` and `last` among them. */
export function scopeAt(set: SetOut, turn: Turn): Scope {
  return { ...set.scope, turn: { kind: 'count', value: turn.turn }, last: { kind: 'count', value: turn.last } }
}

/** Is the hold before this turn passed: each ask right in this round and witnessed where it must be, or released? */
export function holdPassed(state: State, turn: Turn): boolean {
  if (state.released[turn.address]) return true
  return turn.asks.every((_, i) => state.right[askKey(turn.address, i)]) && (!turn.witness || state.witnessed[turn.address] !== undefined)
}

/** The first thing that keeps a turn from being done, apart from the turns before it; null when nothing does. */
export function missing(set: SetOut, state: State, turn: Turn): Reason | null {
  const step = stepOf(set, turn)
  if (!holdPassed(state, turn)) return 'hold-not-passed'
  if (turn.readings.some(i => !readingTaken(set, state, turn, step.readings[i]?.reading ?? ''))) return 'reading-missing'
  if (state.photos.filter(photo => photo.turn === turn.address && photo.round === state.round && photo.for === 'step').length < turn.photos.length) return 'photo-missing'
  return turn.checks.some(i => !state.checked[askKey(turn.address, i)]) ? 'check-missing' : null
}

export function readingTaken(set: SetOut, state: State, turn: Turn, name: string): boolean {
  const times = set.lesson.readings.find(reading => reading.name === name)?.times ?? 1
  return state.readings.some(taken => taken.turn === turn.address && taken.reading === name && taken.round === state.round && taken.values.length >= times)
}

/** Values kept with the stick or taken right in this piece, by reading, the newest last. */
export function samplesOf(set: SetOut, state: State): Record<string, number[]> {
  const samples: Record<string, number[]> = {}
  for (const [name, value] of Object.entries(set.start.once.samples)) samples[name] = [Number(value)]
  for (const taken of state.readings) {
    if (taken.right) (samples[taken.reading] ??= []).push(taken.values.reduce((sum, value) => sum + Number(value), 0) / taken.values.length)
  }
  return samples
}

/** The newest sample of each reading: what is shown, and what a judge goes by. */
export function newestSamples(set: SetOut, state: State): Record<string, number> {
  return Object.fromEntries(Object.entries(samplesOf(set, state)).flatMap(([name, values]) => values.length > 0 ? [[name, values[values.length - 1] ?? 0]] : []))
}

/** Each way a sample may be read: a fact that arrives later adds one and takes none away, so right stays right. */
function sampleWays(set: SetOut, state: State, name: string | null): Record<string, number>[] {
  return name === null ? [{}] : [...(samplesOf(set, state)[name] ?? []).map(value => ({ [name]: value })), {}]
}

/** The ask of that index among all the questions of a turn. */
export function askOf(set: SetOut, turn: Turn, index: number): Ask | null {
  const planned = turn.asks[index]
  return planned ? stepOf(set, turn).holds[planned.hold]?.asks[planned.ask] ?? null : null
}

export function rightAnswer(set: SetOut, state: State, event: EventOf<'hold.answered'>): boolean {
  const turn = set.turns[set.at.get(event.body.turn) ?? -1]
  const ask = turn ? askOf(set, turn, event.body.ask) : null
  if (!turn || !ask) return false
  const sampleOf = ask.kind === 'measure' ? set.lesson.readings.find(reading => reading.name === ask.reading)?.sampleOf ?? null : null
  return sampleWays(set, state, sampleOf).some(samples => isRight(set.lesson, ask, event.body.answer, scopeAt(set, turn), set.start.level, samples))
}

export function rightReading(set: SetOut, state: State, name: string, values: readonly string[]): boolean {
  const reading = set.lesson.readings.find(one => one.name === name)
  if (!reading) return false
  return sampleWays(set, state, reading.sampleOf).some(samples => isWithin(values.map(Number), reading, limitsOf(set.lesson, reading, set.scope, set.start.level, samples)))
}

/** The turns that are to be done again: from a step turn to the end of its part turn, or all of a part turn. */
export function turnsToRemake(set: SetOut, address: string): Turn[] | null {
  const index = set.at.get(address)
  const first = index === undefined ? undefined : set.turns[index]
  if (first && index !== undefined) return set.turns.slice(index).filter(turn => turn.part === first.part && turn.partTurn === first.partTurn)
  const [part, turn = '1'] = address.split('@')
  const whole = set.turns.filter(one => one.part === part && one.partTurn === Number(turn))
  return whole.length > 0 ? whole : null
}
