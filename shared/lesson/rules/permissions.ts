/** Permissions are said at the start, and a flame names its torch. */
import type { Rule } from './context'

export const permissions: Rule = ({ lesson, add }) => {
  if (lesson.permissions.includes('flame') && !lesson.torch) add('torch-missing', { from: 0, to: 3 }, 'With flame, the front matter names the torch taught on: torch: propane and air.')
  for (const step of lesson.parts.flatMap(part => part.steps)) {
    if (step.needs && !step.instead && !lesson.permissions.includes(step.needs)) add('permission-not-said', step.range, `This step needs ${step.needs}. Put it in permissions of the front matter, or say with instead: what to do without it.`)
  }
}
