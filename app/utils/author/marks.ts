/** What the wire in the gutter shows, and at which line. */
import type { Lesson } from '#shared/lesson/schema'
import { stepPlaces } from './places'

export interface WireMark {
  kind: 'step' | 'hold'
  /** From 1. */
  line: number
  /** The step's number; a hold stands before its step and has none. */
  no: number
  title: string
}

/** Steps and holds in the order of the text. A lesson that came with nothing has none. */
export function wireMarks(lesson: Lesson, titleOf: (lesson: Lesson, no: number) => string): WireMark[] {
  return stepPlaces(lesson).flatMap(({ step, no }) => [
    { kind: 'step' as const, line: step.range.line, no, title: titleOf(lesson, no) },
    ...step.holds.map(hold => ({ kind: 'hold' as const, line: hold.range.line, no, title: titleOf(lesson, no) })),
  ]).sort((a, b) => a.line - b.line)
}
