/** Whether an answer is right. Worked out here on both sides; no event carries a verdict. */
import { evaluate, type Scope } from '../lesson/figures'
import type { Ask, Lesson, Node, Reading } from '../lesson/schema'
import type { Answer } from './events'

export interface Limits { is: number, low: number, high: number, agree: number | null }

/** The middle and the limits a reading is held to at a level, in its base unit; null where the lesson gives none. */
export function limitsOf(lesson: Lesson, reading: Reading, scope: Scope, level: number, samples: Readonly<Record<string, number>>): Limits | null {
  const is = middleOf(lesson, reading, scope, samples)
  const tolerance = [...reading.atLevels].sort((a, b) => a.level - b.level).find(at => level <= at.level)?.within ?? reading.within
  const within = tolerance ? numberOf(tolerance, scope) : null
  if (is === null || within === null) return null
  return { is, low: is - within, high: is + within, agree: reading.agree ? numberOf(reading.agree, scope) : null }
}

/** `sample of x` is the value kept with the stick; while there is none, what that reading itself should be. */
function middleOf(lesson: Lesson, reading: Reading, scope: Scope, samples: Readonly<Record<string, number>>): number | null {
  if (reading.sampleOf === null) return reading.is ? numberOf(reading.is, scope) : null
  const kept = samples[reading.sampleOf]
  if (kept !== undefined) return kept
  const other = lesson.readings.find(one => one.name === reading.sampleOf)
  return other?.is ? numberOf(other.is, scope) : null
}

function numberOf(node: Node, scope: Scope): number | null {
  const result = evaluate(node, scope)
  return result.ok && typeof result.value.value === 'number' ? result.value.value : null
}

/** A hair over the limit is the limit: values are typed to a tenth or a hundredth, and doubles do not hold those. */
const HAIR = 1e-9

/** All values inside the limits, as many as are asked for, and agreeing where the lesson says so. No limits: any value is right. */
export function isWithin(values: readonly number[], reading: Reading, limits: Limits | null): boolean {
  if (values.length < reading.times || values.some(value => !Number.isFinite(value))) return false
  if (limits === null) return true
  const spread = Math.max(...values) - Math.min(...values)
  return values.every(value => value >= limits.low - HAIR && value <= limits.high + HAIR) && (limits.agree === null || spread <= limits.agree + HAIR)
}

/** Is this answer to this ask of the right kind at all? A choice must be one that is shown. */
export function answers(ask: Ask, answer: Answer): boolean {
  switch (ask.kind) {
    case 'choices': return 'choice' in answer && ask.choices.some(choice => choice.key === answer.choice)
    case 'count': return 'count' in answer
    case 'measure': return 'values' in answer
    case 'photo': return 'photo' in answer
  }
}

export function isRight(lesson: Lesson, ask: Ask, answer: Answer, scope: Scope, level: number, samples: Readonly<Record<string, number>>): boolean {
  if (ask.kind === 'choices') return 'choice' in answer && ask.choices.some(choice => choice.key === answer.choice && choice.right)
  if (ask.kind === 'count') return 'count' in answer && Number(answer.count) === numberOf(ask.is, scope)
  if (ask.kind === 'photo') return 'photo' in answer
  const reading = lesson.readings.find(one => one.name === ask.reading)
  if (!reading || !('values' in answer)) return false
  return isWithin(answer.values.map(Number), reading, limitsOf(lesson, reading, scope, level, samples))
}
