/** What this studio has: lessons that are needed, and keys of the revision before. */
import { plainText } from '../text'
import type { Rule } from './context'
import { distance, orNear, nearNames } from '../findings'

export const history: Rule = ({ lesson, options, add }) => {
  const slugs = options.lessons ?? null
  if (slugs) for (const need of lesson.needs) if (!slugs.has(need)) add('needs-unknown', { from: 0, to: 3 }, `needs: ${need} is no lesson of this studio.${orNear(nearNames(need, [...slugs]))}`)
  const before = options.previous?.parts.flatMap(part => part.steps) ?? []
  if (before.length === 0) return
  const steps = lesson.parts.flatMap(part => part.steps)
  const now = new Map(steps.map(step => [step.key, step]))
  const titles = new Map(before.map(step => [plainText(step.title), step.key]))
  for (const old of before) {
    const step = now.get(old.key)
    if (!step) { add('key-gone', { from: 0, to: 3 }, `The step ${old.key} of the last revision is gone. Its record ends there.`); continue }
    const title = plainText(step.title)
    const elsewhere = titles.get(title)
    if (elsewhere !== undefined && elsewhere !== old.key && distance(title, plainText(old.title)) > 2) add('key-reused', step.range, `The key ${old.key} was another step in the last revision (“${plainText(old.title)}”). Give this step its own key.`)
  }
}
