/** A lesson at its usual sizes, as lists, sheets and the writing desk show it. */
import type { Drawn } from '../trade/drawing'
import { drawn } from './drawn'
import { sizesScope, workOut } from './figures'
import type { Lesson, SizeValue } from './schema'
import type { Scope } from './values'

export function usualSizes(lesson: Lesson): Record<string, SizeValue> {
  return Object.fromEntries(lesson.sizes.map(size => [size.name, size.usual]))
}

/** Every name of a lesson that has a value at its usual sizes. */
export function usualScope(lesson: Lesson): Scope {
  const sizes = usualSizes(lesson)
  return { ...sizesScope(lesson, sizes), ...workOut(lesson, sizes).figures }
}

/** The drawing that stands for a lesson in a list: its first loop, else its first that is no strip, else its first that can be drawn, else null. */
export function signDrawing(lesson: Lesson): Drawn | null {
  const scope = usualScope(lesson)
  const drawings = lesson.parts.flatMap(part => part.steps).flatMap(step => step.drawings)
  const rank = (kind: string): number => kind === 'loop' ? 0 : kind === 'strip' ? 2 : 1
  const inOrder = [...drawings].sort((a, b) => rank(a.kind) - rank(b.kind))
  for (const drawing of inOrder) {
    const made = drawn(drawing, scope, 'mm', false)
    if (made) return made
  }
  return null
}
