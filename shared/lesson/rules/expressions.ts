/** Every expression in steps, readings, criteria and materials: names are known and the kind is the one wanted there. */
import { nearNames, orNear } from '../findings'
import { kindOf, type Kinds } from '../kinds'
import type { Kind, Node } from '../schema'
import type { Context, Rule } from './context'
import { UNIT_KINDS } from './names'
import type { Place } from '../findings'

type Wanted = Kind | 'any'

function check(context: Context, node: Node | null, wanted: Wanted, at: Place, kinds: Kinds = context.kinds): void {
  if (!node) return
  const kind = kindOf(node, kinds)
  if (!kind.ok) {
    if (kind.name !== undefined && kinds.has(kind.name)) return
    context.add(kind.name === undefined ? 'wrong-kind' : 'unknown-name', at, kind.name === undefined ? kind.says : `${kind.says}${orNear(nearNames(kind.name, [...kinds.keys()]))}`)
    return
  }
  if (wanted === 'any' || kind.kind === wanted || (wanted === 'number' && kind.kind === 'count') || (wanted === 'metal' && kind.kind === 'choice')) return
  if (wanted === 'count') context.add('repeat-not-count', at, 'A whole number is wanted here: a count, or a figure made of counts.')
  else context.add('wrong-kind', at, `A ${wanted.replace('_', ' or ')} is wanted here, and this is a ${kind.kind}.`)
}

export const expressions: Rule = (context) => {
  const { lesson } = context
  const inner = new Map(context.kinds).set('turn', 'count').set('last', 'count')
  for (const part of lesson.parts) {
    check(context, part.repeat, 'count', part.range)
    check(context, part.when, 'yes_no', part.range)
    for (const step of part.steps) steps(context, step, part.repeat !== null || step.repeat !== null ? inner : context.kinds)
  }
  for (const fault of lesson.faults) check(context, fault.when, 'yes_no', fault.range)
  for (const reading of lesson.readings) {
    const kind = UNIT_KINDS[reading.unit] ?? 'length'
    for (const node of [reading.is, reading.within, reading.agree, reading.less, ...reading.atLevels.map(at => at.within)]) check(context, node, kind, reading.range)
  }
  for (const criterion of lesson.criteria) {
    check(context, criterion.when, 'yes_no', criterion.range)
    const unit = lesson.readings.find(reading => reading.name === criterion.reading)?.unit
    for (const node of [criterion.within, ...criterion.atLevels.map(at => at.within)]) check(context, node, unit ? UNIT_KINDS[unit] ?? 'any' : 'any', criterion.range)
  }
  for (const material of lesson.materials) {
    check(context, material.when, 'yes_no', material.range)
    check(context, material.metal, 'metal', material.range)
    for (const node of [material.wire, material.cord, material.size, material.length]) check(context, node, 'length', material.range)
    for (const node of [material.each, material.spare]) check(context, node, 'count', material.range)
  }
}

function steps(context: Context, step: Context['lesson']['parts'][number]['steps'][number], kinds: Kinds): void {
  check(context, step.repeat, 'count', step.range, kinds)
  check(context, step.when, 'yes_no', step.range, kinds)
  for (const list of [step.safety, step.holds, step.checks, step.readings, step.photos, step.waits, step.faults, step.drawings, step.why, step.feel]) {
    for (const item of list) check(context, item.when, 'yes_no', item.range, kinds)
  }
  for (const hold of step.holds) for (const ask of hold.asks) if (ask.kind === 'count') check(context, ask.is, 'count', hold.range, kinds)
  for (const wait of step.waits) check(context, wait.length, 'time', wait.range, kinds)
  for (const drawing of step.drawings) for (const [key, nodes] of Object.entries(drawing.args)) for (const node of nodes) check(context, node, ['turns', 'beads', 'knot'].includes(key) ? 'any' : 'length', drawing.range, kinds)
}
