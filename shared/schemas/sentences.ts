import type { z } from 'zod'

const HOW_MANY: Record<string, string> = { string: 'letters', array: 'lines' }

/** What a person can act on, for an entry that has no sentence of its own. Used by forms and by the server alike. */
export const sentenceOf: z.core.$ZodErrorMap = (issue) => {
  const unit = issue.code === 'too_small' || issue.code === 'too_big' ? HOW_MANY[issue.origin] : undefined
  switch (issue.code) {
    case 'invalid_type': return issue.input === undefined || issue.input === null ? 'This is missing.' : 'This is of the wrong kind.'
    case 'too_small': return unit ? (Number(issue.minimum) === 1 ? 'This is missing.' : `At least ${issue.minimum} ${unit}.`) : `${issue.minimum} or more.`
    case 'too_big': return unit ? `At most ${issue.maximum} ${unit}.` : `${issue.maximum} or less.`
    case 'unrecognized_keys': return `Not asked for: ${issue.keys.join(', ')}.`
    case 'invalid_value': return 'Choose one of those offered.'
    default: return 'This cannot be read as it stands.'
  }
}
