/** The pictures a lesson shows, by name. */
import { plainText } from './plain'
import type { Lesson } from './schema'

export interface PictureUse { name: string, alt: string, mirror: boolean }

/** Each picture once, in the order of the lesson: those of the steps, then those a judge compares with. */
export function picturesOf(lesson: Lesson): PictureUse[] {
  const inSteps = lesson.parts.flatMap(part => part.steps).flatMap(step => step.pictures).map(({ name, alt, mirror }) => ({ name, alt: plainText(alt), mirror }))
  const judged = lesson.criteria.flatMap(({ says, pictures }) => Object.entries(pictures).map(([mark, name]) => ({ name, alt: `${says}: ${mark}`, mirror: false })))
  return [...new Map([...inSteps, ...judged].reverse().map(use => [use.name, use])).values()].reverse()
}
