/** A lesson at its usual sizes, as its page and the writing desk show it. */
import { sizesScope, workOut, type Scope } from '#shared/lesson/figures'
import type { Lesson, SizeValue } from '#shared/lesson/schema'
import { shownValue } from '#shared/lesson/shown'

/** How a size or figure reads in a text. */
export type FigureText = (name: string, to?: number) => string

export function usualSizes(lesson: Lesson): Record<string, SizeValue> {
  return Object.fromEntries(lesson.sizes.map(size => [size.name, size.usual]))
}

/** Every name of a lesson that has a value at its usual sizes. */
export function usualScope(lesson: Lesson): Scope {
  const sizes = usualSizes(lesson)
  return { ...sizesScope(lesson, sizes), ...workOut(lesson, sizes).figures }
}

/** The text of any size or figure at the usual sizes; a name that has no value reads as a question mark. */
export function usualFigures(lesson: Lesson): FigureText {
  const scope = usualScope(lesson)
  return (name, to) => {
    const value = scope[name]
    return value ? shownValue(value, 'mm', to) : '?'
  }
}
