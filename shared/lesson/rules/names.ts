/** Names stand once; each figure has one kind; what it uses is known. One cause, one finding: users of a bad figure are silent. */
import { KIND_OF_UNIT } from '../figures'
import { kindOf } from '../kinds'
import type { Kind } from '../schema'
import { nearNames, orNear } from '../findings'
import type { Rule } from './context'

export const UNIT_KINDS: Record<string, Kind> = { mm: 'length', g: 'mass', N: 'force', deg: 'angle', count: 'count', number: 'number' }

export const names: Rule = ({ lesson, kinds, add }) => {
  const seen = new Set<string>()
  const once = (name: string, at: { from: number, to: number }) => {
    if (seen.has(name)) add('duplicate-name', at, `The name ${name} stands twice. Sizes, figures and readings have one set of names.`)
    seen.add(name)
  }
  for (const [name, kind] of [['goods', 'yes_no'], ['practice', 'yes_no'], ['left', 'yes_no']] as const) kinds.set(name, kind)
  for (const size of lesson.sizes) { once(size.name, size.range); kinds.set(size.name, KIND_OF_UNIT[size.unit]) }
  for (const figure of lesson.figures) {
    once(figure.name, figure.range)
    const kind = kindOf(figure.node, kinds)
    if (kind.ok) { figure.kind = kind.kind; kinds.set(figure.name, kind.kind); continue }
    const known = kind.name !== undefined && kinds.has(kind.name)
    if (!known) add(kind.name === undefined ? 'wrong-kind' : 'unknown-name', figure.range, kind.name === undefined ? kind.says : `${kind.says} A figure uses those above it.${orNear(nearNames(kind.name, [...kinds.keys()]))}`)
    kinds.set(figure.name, null)
  }
  for (const reading of lesson.readings) once(reading.name, reading.range)
}
