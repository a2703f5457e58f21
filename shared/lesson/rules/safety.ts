/** A safety note names the hazard, what it does and how to avoid it, and stands before the action. */
import { plainText } from '../text'
import type { Rule } from './context'

const SAFETY = new Set(['DANGER', 'WARNING', 'CAUTION', 'NOTICE'])

export const safety: Rule = ({ lesson, sighted, add }) => {
  for (const step of lesson.parts.flatMap(part => part.steps)) {
    for (const note of step.safety) {
      if (plainText(note.hazard).split(/\s+/).filter(Boolean).length < 3 || plainText(note.avoid).trim() === '') add('note-without-consequence', note.range, `${note.word} names the hazard and what it does on its line, and below it how to avoid it.`)
    }
  }
  for (const { items } of sighted.steps) {
    const act = items.findIndex(item => item.t === 'text' && item.lines.some(line => line.text.trim() !== ''))
    const late = items.findIndex((item, i) => i > act && act >= 0 && item.t === 'block' && SAFETY.has(item.keyword))
    const note = items[late]
    if (note) add('safety-late', note.at, 'This safety note stands after the action. Move it above, where it is read in time.')
  }
}
