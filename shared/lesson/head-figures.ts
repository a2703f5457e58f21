/** Sizes, figures and readings of the front matter. */
import { METAL_NAMES } from './functions'
import { readTyped } from '../trade/units'
import type { Entry } from './front'
import { find, type Reader } from './read'
import { type Figure, FIGURE_UNITS, FUNCTIONS, type Node, type Reading, type Size, SIZE_UNITS, type SizeUnit, type SizeValue } from './schema'
import { nearNames, orNear } from './findings'

const RESERVED = new Set<string>([...FUNCTIONS, ...FIGURE_UNITS, 'turn', 'last', 'goods', 'practice', 'left', 'pi', 'and', 'or', 'not', 'clockwise', 'anticlockwise', 'true', 'false', 'to', 'mod', 'xor'])

/** A name of a size, figure or reading; what is none leaves a finding. */
function isName(read: Reader, entry: Entry): boolean {
  if (!/^[a-z][a-z0-9_]{0,30}$/.test(entry.key)) {
    read.findings.add('bad-name', entry.keyAt, `“${entry.key}” is no name. A name is small letters, digits and _, from a letter on, 31 at most.`)
    return false
  }
  if (RESERVED.has(entry.key)) {
    read.findings.add('bad-name', entry.keyAt, `“${entry.key}” already means something in a lesson. Take another name.`)
    return false
  }
  return true
}

const rangeOf = (read: Reader, entry: Entry) => read.findings.range(entry.from, entry.to)
const SIZE_KEYS = ['ask', 'unit', 'usual', 'from', 'to', 'step', 'choices']

export function readSizes(read: Reader, entry: Entry | undefined): Size[] {
  return read.map(entry).flatMap((one) => {
    if (!isName(read, one)) return []
    const entries = read.map(one)
    read.unknownKeys(entries, SIZE_KEYS, key => orNear(nearNames(key, SIZE_KEYS)))
    const unit = read.oneOf(find(entries, 'unit'), SIZE_UNITS)
    if (!unit) {
      if (!find(entries, 'unit')) read.findings.add('front-value', one.keyAt, `${one.key}: a size has a unit: ${SIZE_UNITS.join(', ')}.`)
      return []
    }
    const choices = read.texts(find(entries, 'choices'))
    const usual = sizeValue(read, find(entries, 'usual'), unit, choices)
    if (usual === null) {
      if (!find(entries, 'usual')) read.findings.add('front-value', one.keyAt, `${one.key}: a size has a usual value.`)
      return []
    }
    const number = (key: string) => { const value = sizeValue(read, find(entries, key), unit, []); return typeof value === 'number' ? value : null }
    const size: Size = { name: one.key, ask: read.text(find(entries, 'ask')) ?? one.key, unit, usual, from: number('from'), to: number('to'), step: number('step'), choices, range: rangeOf(read, one) }
    if (typeof usual === 'number' && ((size.from !== null && usual < size.from - 1e-9) || (size.to !== null && usual > size.to + 1e-9))) read.findings.add('usual-outside', find(entries, 'usual')?.value.at ?? one.keyAt, `${one.key}: the usual value lies outside from and to.`)
    return [size]
  })
}

/** The value of a size in its base unit. */
function sizeValue(read: Reader, entry: Entry | undefined, unit: SizeUnit, choices: readonly string[]): SizeValue | null {
  const text = read.text(entry)
  if (!entry || text === null) return null
  if (unit === 'yes_no') return read.yesNo(entry)
  if (unit === 'choice' || unit === 'metal') {
    const list = unit === 'metal' && choices.length === 0 ? METAL_NAMES : choices
    if (list.includes(text)) return text
    read.bad(entry, `${entry.key}: ${text} is none of ${list.join(', ')}.`)
    return null
  }
  const typed = readTyped(text, unit)
  if (typed.ok) return typed.value
  read.bad(entry, `${entry.key}: ${typed.says}`)
  return null
}

/** Figures as read; their kinds are found when all names are known. */
export function readFigures(read: Reader, entry: Entry | undefined): Figure[] {
  return read.map(entry).flatMap((one) => {
    if (!isName(read, one)) return []
    const node = read.node(one)
    return node ? [{ name: one.key, kind: 'number' as const, node, source: read.text(one) ?? '', range: rangeOf(read, one) }] : []
  })
}

/** Names of figures that could not be read: known, but without a value. */
export function badFigures(read: Reader, entry: Entry | undefined, good: readonly Figure[]): string[] {
  return entry?.value.t === 'map' ? entry.value.v.map(one => one.key).filter(name => !good.some(figure => figure.name === name)) : []
}

const READING_KEYS = ['ask', 'unit', 'is', 'within', 'step', 'times', 'agree', 'with', 'less', 'gives']
const READING_UNITS = ['mm', 'g', 'N', 'deg', 'count', 'number'] as const

export function readReadings(read: Reader, entry: Entry | undefined): Reading[] {
  return read.map(entry).flatMap((one) => {
    if (!isName(read, one)) return []
    const entries = read.map(one)
    read.unknownKeys(entries.filter(each => !/^at level [1-5]$/.test(each.key)), READING_KEYS, key => `${orNear(nearNames(key, READING_KEYS))}`)
    const unit = read.oneOf(find(entries, 'unit'), READING_UNITS) ?? 'mm'
    const times = Number(read.text(find(entries, 'times')) ?? 1)
    const is = readIs(read, find(entries, 'is'))
    const step = read.node(find(entries, 'step'))
    return [{
      name: one.key, ask: read.text(find(entries, 'ask')) ?? one.key, unit, ...is, within: read.node(find(entries, 'within')), atLevels: readAtLevels(read, entries),
      step: step?.k === 'num' ? step.v : null, times: Number.isInteger(times) && times >= 1 && times <= 12 ? times : 1, agree: read.node(find(entries, 'agree')), with: read.text(find(entries, 'with')),
      less: read.node(find(entries, 'less')), gives: read.text(find(entries, 'gives')), range: rangeOf(read, one),
    }]
  })
}

/** `sample of x` names another reading; anything else is an expression. */
function readIs(read: Reader, entry: Entry | undefined): { is: Node | null, sampleOf: string | null } {
  const sample = /^sample of ([a-z][a-z0-9_]{0,30})$/.exec(read.text(entry) ?? '')?.[1]
  return sample ? { is: null, sampleOf: sample } : { is: read.node(entry), sampleOf: null }
}

/** `at level 2: 0.3 mm`: the tolerance at level 2 and below. */
export function readAtLevels(read: Reader, entries: readonly Entry[]): { level: number, within: Node }[] {
  return entries.flatMap((entry) => {
    const level = /^at level ([1-5])$/.exec(entry.key)?.[1]
    const within = level ? read.node(entry) : null
    return within ? [{ level: Number(level), within }] : []
  })
}
