/** The names a lesson's expressions may use in one piece: its sizes and figures as told, and the facts it began with. */
import { KIND_OF_UNIT, type Scope, type Value } from '../lesson/figures'
import type { Kind, Lesson, Size } from '../lesson/schema'
import type { PieceStarted, Told } from './events'

export { KIND_OF_UNIT }

/** A value as events carry it (decimal text; yes, no; words) in its kind. Null when the text is not of that kind. */
export function valueOf(text: string, kind: Kind): Value | null {
  if (kind === 'metal' || kind === 'choice') return { kind, value: text }
  if (kind === 'yes_no') return text === 'yes' || text === 'no' ? { kind, value: text === 'yes' } : null
  const value = Number(text)
  return text.trim() !== '' && Number.isFinite(value) ? { kind, value } as Value : null
}

/** A value as events carry it. */
export function textOf(value: Value): string {
  if (typeof value.value === 'boolean') return value.value ? 'yes' : 'no'
  return typeof value.value === 'number' ? Number(value.value.toFixed(12)).toString() : value.value
}

/** What is wrong with a told size, or null. What lies outside `from` and `to` is right here: it only keeps to practice. */
export function faultOfSize(size: Size, told: Told | undefined): string | null {
  if (!told) return `Missing: ${size.ask}.`
  const value = valueOf(told.value, KIND_OF_UNIT[size.unit])
  if (!value) return `${size.ask}: this cannot be read.`
  if (size.choices.length > 0 && typeof value.value === 'string' && !size.choices.includes(value.value)) return `${size.ask}: choose one of ${size.choices.join(', ')}.`
  if (value.kind === 'count' && !Number.isInteger(value.value)) return `${size.ask}: a whole number.`
  return null
}

/** Is a told size inside what the lesson covers? */
export function covered(size: Size, told: Told): boolean {
  const value = Number(told.value)
  if (!Number.isFinite(value)) return true
  return (size.from === null || value >= size.from - 1e-9) && (size.to === null || value <= size.to + 1e-9)
}

export function scopeOf(lesson: Lesson, start: PieceStarted): Scope {
  const scope: Scope = {
    goods: { kind: 'yes_no', value: start.goods !== null },
    practice: { kind: 'yes_no', value: start.practice },
    left: { kind: 'yes_no', value: start.left },
  }
  for (const size of lesson.sizes) {
    const told = start.sizes[size.name]
    const value = told ? valueOf(told.value, KIND_OF_UNIT[size.unit]) : null
    if (value) scope[size.name] = value
  }
  for (const figure of lesson.figures) {
    const text = start.figures[figure.name]
    const value = text === undefined ? null : valueOf(text, figure.kind)
    if (value) scope[figure.name] = value
  }
  return scope
}
