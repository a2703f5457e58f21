/** What a new revision changes against the one before, as far as it can be told from the two lessons themselves. */
import type { Effect } from '../schemas/lists'
import { canonical } from './canonical'
import type { Lesson, Step } from './schema'

export interface EffectFound {
  effect: Effect
  /** What was found, each a short sentence; at most one for a kind of change. */
  says: string[]
}

/** Offsets move with every letter typed; they are no change. */
const bare = (value: unknown): string => canonical(withoutRanges(value))
function withoutRanges(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(withoutRanges)
  if (value === null || typeof value !== 'object') return value
  return Object.fromEntries(Object.entries(value).filter(([name]) => name !== 'range' && name !== 'source').map(([name, inside]) => [name, withoutRanges(inside)]))
}
const same = (a: unknown, b: unknown): boolean => bare(a) === bare(b)
const EMPTY: Step = {
  key: '', title: [], range: { from: 0, to: 0, line: 1 }, repeat: null, say: null, when: null, stop: null, oneAct: false, heat: false, usual: null, needs: null, instead: null, safety: [], holds: [],
  text: [], pictures: [], drawings: [], checks: [], readings: [], photos: [], waits: [], faults: [], why: [], feel: [],
}
const stepsOf = (lesson: Lesson): Step[] => lesson.parts.flatMap(part => part.steps)
/** What steps hold, by their keys; a step that holds none of it is left out, so that renaming it changes nothing here. */
const byKey = (lesson: Lesson, of: (step: Step) => unknown): Record<string, unknown> => {
  const nothing = bare(of(EMPTY))
  return Object.fromEntries(stepsOf(lesson).map(step => [step.key, of(step)] as const).filter(([, held]) => bare(held) !== nothing))
}

interface Rule { effect: 'step' | 'standard', says: string, of: (lesson: Lesson) => unknown }
/** In the order they are told. A rule finds a change where what it reads of the two lessons differs. */
const RULES: Rule[] = [
  { effect: 'standard', says: 'What is judged changed.', of: ({ criteria }) => criteria },
  { effect: 'standard', says: 'A measure or its tolerance changed.', of: ({ readings }) => readings },
  { effect: 'standard', says: 'A hold point changed.', of: lesson => byKey(lesson, step => step.holds) },
  { effect: 'standard', says: 'A safety note changed.', of: lesson => byKey(lesson, step => step.safety) },
  { effect: 'standard', says: 'What must be held first, or allowed, changed.', of: ({ needs, permissions, torch }) => ({ needs, permissions, torch }) },
  { effect: 'step', says: 'Steps were added, taken out or moved.', of: ({ parts }) => parts.map(({ key, repeat, when, order, steps }) => ({ key, repeat, when, order, steps: steps.map(step => step.key) })) },
  { effect: 'step', says: 'A size or a figure changed.', of: ({ sizes, figures }) => ({ sizes, figures }) },
  { effect: 'step', says: 'Tools or materials changed.', of: ({ tools, materials }) => ({ tools, materials }) },
  { effect: 'step', says: 'What is asked, measured, photographed or waited for in a step changed.', of: lesson => byKey(lesson, ({ checks, readings, photos, waits, drawings, repeat, when, needs }) => ({ checks, readings, photos, waits, drawings, repeat, when, needs })) },
]

/** The largest change found; `words` where only wording differs, `first` where there is nothing to compare with. */
export function effectOf(previous: Lesson | null, next: Lesson): EffectFound {
  if (!previous) return { effect: 'first', says: [] }
  const found = RULES.filter(rule => !same(rule.of(previous), rule.of(next)))
  const effect = found.some(rule => rule.effect === 'standard') ? 'standard' : found.length > 0 ? 'step' : 'words'
  return { effect, says: found.map(rule => rule.says) }
}
