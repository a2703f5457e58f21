/** Lesson text as plain words, for a note or a list: figures are said as they were told for this piece. */
import type { SetOut } from '../bench/set-out'
import { plainText } from '../lesson/plain'
import type { Inline } from '../lesson/schema'
import { shownValue } from '../lesson/shown'

export function plainIn(line: readonly Inline[], set: SetOut): string {
  return plainText(line, (name, to) => {
    const value = set.scope[name]
    return value ? shownValue(value, 'mm', to) : name
  })
}
