/** Holds that are asked once for a stick (person, lesson, sizes, day) or a class evening, and readings kept with the stick. */
import { canonical } from '../lesson/canonical'
import type { Lesson } from '../lesson/schema'
import type { PieceStarted } from './events'
import { holdPassed, newestSamples, setOut } from './set-out'
import type { State } from './state'

export interface OnceFact { state: State }
export type Once = PieceStarted['once']

/** The same sizes, however they were typed. */
const valuesOf = (sizes: PieceStarted['sizes']): string => canonical(Object.fromEntries(Object.entries(sizes).map(([name, told]) => [name, told.value])))
const sameSizes = (a: PieceStarted, b: PieceStarted): boolean => valuesOf(a.sizes) === valuesOf(b.sizes)
const dayOf = (at: string | null): string => at?.slice(0, 10) ?? ''

/** What a new piece need not ask again, from the person's earlier pieces of the same revision; `day` is YYYY-MM-DD (UTC). */
export function onceFrom(lesson: Lesson, sizes: PieceStarted['sizes'], earlier: readonly OnceFact[], day: string): Once {
  const passed = new Set<string>()
  const samples: Record<string, string> = {}
  for (const { state } of [...earlier].reverse()) {
    if (!state.start || dayOf(state.startedAt) !== day) continue
    const same = valuesOf(state.start.sizes) === valuesOf(sizes)
    for (const key of passedIn(lesson, state, same)) passed.add(key)
    if (same) for (const [name, value] of Object.entries(kept(lesson, state))) samples[name] = String(Number(value.toFixed(6)))
  }
  return { passed: [...passed].sort(), samples }
}

/** Does everything a start claims as passed before, or as kept with the stick, stand in an earlier piece? */
export function onceKnown(lesson: Lesson, start: PieceStarted, earlier: readonly OnceFact[]): boolean {
  const told = start.once
  const passedBefore = (key: string) => earlier.some(({ state }) => state.start && passedIn(lesson, state, sameSizes(state.start, start)).has(key))
  const sampleBefore = ([name, value]: [string, string]) => earlier.some(({ state }) => {
    if (!state.start || !sameSizes(state.start, start)) return false
    const own = kept(lesson, state)[name]
    return own !== undefined && Math.abs(own - Number(value)) < 1e-6
  })
  return told.passed.every(passedBefore) && Object.entries(told.samples).every(sampleBefore)
}

/** Step keys of the `once` holds passed in a piece: those of the evening, and those of the stick when the sizes are the same. */
function passedIn(lesson: Lesson, state: State, same: boolean): Set<string> {
  const set = state.start ? setOut(lesson, state.start) : null
  const keys = new Set<string>(state.start && same ? state.start.once.passed : [])
  for (const turn of set?.turns ?? []) {
    const hold = turn.asks[0] ? set?.steps.get(turn.step)?.holds[turn.asks[0].hold] : undefined
    if (!hold || hold.once === 'piece' || (hold.once === 'stick' && !same)) continue
    if (!state.released[turn.address] && (state.done[turn.address] !== undefined || holdPassed(state, turn))) keys.add(turn.step)
  }
  return keys
}

/** Readings that holds of the stick took right: name to value in its base unit. */
function kept(lesson: Lesson, state: State): Record<string, number> {
  const set = state.start ? setOut(lesson, state.start) : null
  if (!set) return {}
  const ofStick = new Set(lesson.parts.flatMap(part => part.steps.flatMap(step => step.holds.filter(hold => hold.once === 'stick')
    .flatMap(hold => hold.asks.flatMap(ask => ask.kind === 'measure' ? [ask.reading] : [])))))
  return Object.fromEntries(Object.entries(newestSamples(set, state)).filter(([name]) => ofStick.has(name)))
}
