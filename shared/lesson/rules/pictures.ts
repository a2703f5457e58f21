/** Pictures are there, have plain names and say what is seen. */
import { plainText } from '../text'
import type { Rule } from './context'

export const pictures: Rule = ({ lesson, options, add }) => {
  const there = options.pictures ?? null
  for (const step of lesson.parts.flatMap(part => part.steps)) {
    for (const picture of step.pictures) {
      if (!/^[a-z0-9][a-z0-9._-]{0,79}$/.test(picture.name)) { add('picture-name', picture.range, `“${picture.name.slice(0, 60)}” is no plain name. A picture is named with a-z 0-9 . - _ and lies beside the lesson.`); continue }
      if (there && !there.has(picture.name)) add('picture-missing', picture.range, `There is no picture ${picture.name} beside this lesson. Add it, or take this line out.`)
      if (plainText(picture.alt).trim() === '') add('picture-no-alt', picture.range, 'Say in the square brackets what is seen in the picture.')
    }
    if (step.pictures.length > 1) add('more-pictures', step.pictures[1]?.range ?? step.range, 'One picture a step. Make a step of its own for the second.')
  }
  if (!there) return
  for (const criterion of lesson.criteria) for (const name of Object.values(criterion.pictures)) if (!there.has(name)) add('picture-missing', criterion.range, `There is no picture ${name} beside this lesson.`)
}
