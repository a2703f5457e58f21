/** What the wire in the gutter shows, and at which line. */
import type { Lesson } from '#shared/lesson/schema'
import { stepPlaces } from './places'

export interface WireMark {
  kind: 'step' | 'hold'
  /** From 1. */
  line: number
  /** The step's number; a hold stands before its step and has none. */
  no: number
}

/** Steps and holds in the order of the text. A lesson that came with nothing has none. */
export function wireMarks(lesson: Lesson): WireMark[] {
  return stepPlaces(lesson).flatMap(({ step, no }) => [
    { kind: 'step' as const, line: step.range.line, no },
    ...step.holds.map(hold => ({ kind: 'hold' as const, line: hold.range.line, no })),
  ]).sort((a, b) => a.line - b.line)
}
