/** A lesson at its usual sizes, as its page and the writing desk show it. */
import { KIND_OF_UNIT, workOut } from '#shared/lesson/figures'
import type { Lesson, SizeValue } from '#shared/lesson/schema'

export type FigureText = (name: string, to?: number) => string

export function usualSizes(lesson: Lesson): Record<string, SizeValue> {
  return Object.fromEntries(lesson.sizes.map(size => [size.name, size.usual]))
}

const SIGNS: Record<string, string> = { length: ' mm', area: ' mm²', mass: ' g', angle: '°', force: ' N', time: ' s' }

/** A value as it reads: rounded to the step asked for, else to what a bench can tell apart. */
export function showValue(value: SizeValue | undefined, kind: string, to?: number): string {
  if (value === undefined) return '?'
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value === 'string') return value
  const step = to ?? (kind === 'length' || kind === 'mass' ? (Math.abs(value) < 2 ? 0.01 : 0.1) : 0.01)
  const places = Math.max(0, -Math.floor(Math.log10(step)))
  return `${Number((Math.round(value / step) * step).toFixed(places))}${SIGNS[kind] ?? ''}`
}

/** The text of any size or figure of a lesson at its usual sizes; a name that has no value reads as a question mark. */
export function usualFigures(lesson: Lesson): FigureText {
  const sizes = usualSizes(lesson)
  const worked = workOut(lesson, sizes)
  return (name, to) => {
    const size = lesson.sizes.find(one => one.name === name)
    if (size) return showValue(size.usual, KIND_OF_UNIT[size.unit], to)
    const figure = worked.figures[name]
    return figure ? showValue(figure.value, figure.kind, to) : '?'
  }
}
