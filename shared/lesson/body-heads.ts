/** The fields right under a part's or a step's heading. */
import { minutes, type Reader } from './read'
import { type Inline, type Node, type Part, PERMISSIONS, type Range, type Step, STOPS } from './schema'
import type { Field, Item } from './scan'
import { isKey } from './slugs'
import { readInline } from './text'

type Heading = Extract<Item, { t: 'heading' }>
const field = (item: Heading, key: string): Field | undefined => item.fields.findLast(one => one.key === key)

export function emptyStep(key: string, title: Inline[], range: Range): Step {
  return {
    key, title, range, repeat: null, say: null, when: null, stop: null, oneAct: false, heat: false, usual: null, needs: null, instead: null, safety: [], holds: [], text: [], pictures: [], drawings: [], checks: [],
    readings: [], photos: [], waits: [], faults: [], why: [], feel: [],
  }
}

type PartFields = Pick<Part, 'repeat' | 'say' | 'order' | 'when' | 'stop'>
export function readPartFields(read: Reader, item: Heading): PartFields {
  keyOf(read, item)
  return { repeat: node(read, item, 'repeat'), say: field(item, 'say')?.value ?? null, order: oneOf(read, item, 'order', ['each', 'step'] as const) ?? 'each', when: node(read, item, 'when'), stop: oneOf(read, item, 'stop', STOPS) }
}

type StepFields = Pick<Step, 'repeat' | 'say' | 'when' | 'stop' | 'oneAct' | 'heat' | 'usual' | 'needs' | 'instead'>
export function readStepFields(read: Reader, item: Heading): StepFields {
  keyOf(read, item)
  const usual = field(item, 'usual')
  const time = usual ? minutes(usual.value) ?? (Number.isFinite(Number(usual.value)) ? Number(usual.value) : null) : null
  if (usual && time === null) read.findings.add('field-value', usual.at, 'usual: a time, as 5 min.')
  const instead = field(item, 'instead')
  return {
    repeat: node(read, item, 'repeat'), say: field(item, 'say')?.value ?? null, when: node(read, item, 'when'), stop: oneOf(read, item, 'stop', STOPS), oneAct: yes(read, item, 'one_act'), heat: yes(read, item, 'heat'),
    usual: time, needs: oneOf(read, item, 'needs', PERMISSIONS), instead: instead ? readInline(instead.value, read.findings, instead.at) : null,
  }
}

function keyOf(read: Reader, item: Heading): void {
  const key = field(item, 'key')
  if (key && !isKey(key.value)) read.findings.add('field-value', key.at, 'A key is small letters, digits and -, 40 at most.')
}

function node(read: Reader, item: Heading, key: string): Node | null {
  const found = field(item, key)
  return found ? read.expression(found.value, found.at) : null
}

function oneOf<T extends string>(read: Reader, item: Heading, key: string, list: readonly T[]): T | null {
  const found = field(item, key)
  if (!found) return null
  const value = list.find(one => one === found.value)
  if (value === undefined) read.findings.add('field-value', found.at, `${key}: ${found.value || 'nothing'} is none of ${list.join(', ')}.`)
  return value ?? null
}

const yes = (read: Reader, item: Heading, key: string): boolean => oneOf(read, item, key, ['yes', 'no'] as const) === 'yes'
