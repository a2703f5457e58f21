/** Where in a lesson an offset of its text is. */
import type { Lesson, Part, Step } from '#shared/lesson/schema'

export interface StepPlace { part: Part, step: Step, no: number }

/** Every step with its number, in the order of the text. */
export function stepPlaces(lesson: Lesson): StepPlace[] {
  let no = 0
  return lesson.parts.flatMap(part => part.steps.map(step => ({ part, step, no: ++no })))
}

/** The step whose text an offset is in: the last that begins at or before it, unless a part's heading comes between. */
export function stepAt(lesson: Lesson, offset: number): StepPlace | null {
  const place = stepPlaces(lesson).filter(({ step }) => step.range.from <= offset).at(-1)
  if (!place) return null
  const later = lesson.parts.some(part => part.range.from > place.step.range.from && part.range.from <= offset)
  return later ? null : place
}

const FRONT_NAMES: Record<string, string> = { sizes: 'Sizes', figures: 'Figures', readings: 'Readings', criteria: 'Judging', tools: 'Tools', materials: 'Materials', closing: 'Closing list', needs: 'Lessons to hold first', permissions: 'Permissions', time: 'Time' }

/** What to call the place of an offset: "Step 4", "Sizes", "Head", "Opening". */
export function placeName(source: string, lesson: Lesson | null, offset: number): string {
  const step = lesson ? stepAt(lesson, offset) : null
  if (step) return `Step ${step.no}`
  const front = /^---\r?\n[\s\S]*?^---\s*$/m.exec(source)
  if (front?.index === 0 && offset <= front[0].length) {
    const field = [...source.slice(0, source.indexOf('\n', offset) === -1 ? source.length : source.indexOf('\n', offset)).matchAll(/^([a-z_]+):/gm)].at(-1)?.[1]
    return (field && FRONT_NAMES[field]) ?? 'Head'
  }
  const part = lesson?.parts.filter(one => one.range.from <= offset && one.title.length > 0).at(-1)
  return part ? 'Part' : 'Opening'
}
