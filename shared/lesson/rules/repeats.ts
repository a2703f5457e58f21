/** A repeat is a count from 0 to 200, at the usual sizes and at every size the lesson covers. */
import { evaluate, sizesScope, workOut } from '../figures'
import type { Node, Range } from '../schema'
import type { Scope } from '../values'
import type { Rule } from './context'
import { samplePoints } from './corners'

export const MOST_REPEATS = 200
const FACTS: Scope = { goods: { kind: 'yes_no', value: false }, practice: { kind: 'yes_no', value: true }, left: { kind: 'yes_no', value: false } }

interface Repeat { node: Node, at: Range, outer: Node | null }

export const repeats: Rule = ({ lesson, add }) => {
  const all = lesson.parts.flatMap((part): Repeat[] => [
    ...part.repeat ? [{ node: part.repeat, at: part.range, outer: null }] : [],
    ...part.steps.flatMap(step => step.repeat ? [{ node: step.repeat, at: step.range, outer: part.repeat }] : []),
  ])
  if (all.length === 0) return
  const told = new Set<Repeat>()
  for (const sizes of samplePoints(lesson)) {
    const scope = { ...FACTS, ...sizesScope(lesson, sizes), ...workOut(lesson, sizes, FACTS).figures }
    for (const repeat of all) {
      if (told.has(repeat)) continue
      const times = timesOf(repeat, scope)
      // What has no value is told of elsewhere.
      if (times === null || (times >= 0 && times <= MOST_REPEATS)) continue
      told.add(repeat)
      const at = lesson.sizes.map(size => `${size.name} ${String(sizes[size.name])}`).slice(0, 6).join(', ')
      add('repeat-range', repeat.at, `This is repeated 0 to ${MOST_REPEATS} times, and comes out at ${times}. It is so at ${at}.`)
    }
    if (told.size === all.length) return
  }
}

/** How often, in the last turn of a repeated part, where `turn` is largest. */
function timesOf({ node, outer }: Repeat, scope: Scope): number | null {
  const last = outer ? valueOf(outer, scope) : null
  return valueOf(node, last === null ? scope : { ...scope, turn: { kind: 'count', value: last }, last: { kind: 'count', value: last } })
}

function valueOf(node: Node, scope: Scope): number | null {
  const result = evaluate(node, scope)
  return result.ok && typeof result.value.value === 'number' ? result.value.value : null
}
