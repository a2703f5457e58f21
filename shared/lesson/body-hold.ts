/** A HOLD: what cannot be undone, and what is asked of the work before it. */
import { type BlockParts, type KeywordItem, splitCommas } from './body-blocks'
import { readChoices } from './choices'
import type { Reader } from './read'
import { type Ask, type Hold, ONCE, WITNESS } from './schema'
import { readInline } from './text'

export function readHold(read: Reader, item: KeywordItem, parts: BlockParts): Hold | null {
  const { findings } = read
  if (item.title === '') findings.add('hold-no-consequence', item.at, 'A HOLD says what cannot be undone: HOLD After this the silver is cut.')
  const { question, choices, fixed } = readChoices(read, parts, item)
  const asks = parts.fields.flatMap(({ key, value, at }): Ask[] => {
    if (key === 'count') return countOf(read, value, at)
    if (key === 'measure') return splitCommas(value).map(reading => ({ kind: 'measure', reading }))
    return key === 'photo' ? [{ kind: 'photo', prompt: readInline(value, findings, at) }] : []
  })
  if (choices.length > 0) asks.push({ kind: 'choices', question, choices, fixed })
  const witness = oneOf(read, parts, 'witness', WITNESS)
  const wrong = parts.inline('wrong')
  const counted = asks.some(ask => ask.kind === 'count' || ask.kind === 'measure')
  if (counted && !wrong) findings.add('hold-no-wrong', item.at, 'A count or a measure can be wrong: say in wrong: what is the matter then, and what to do.')
  if (asks.length === 0 || (!witness && asks.every(ask => ask.kind === 'photo'))) findings.add('hold-cannot-fail', item.at, 'Nothing asked here can be wrong. Ask a count, a measure or a choice about the work, or have an instructor look: witness: always.')
  const hold: Hold = {
    consequence: readInline(item.title, findings, item.titleAt), text: choices.length > 0 ? [] : question, asks, wrong, witness, once: oneOf(read, parts, 'once', ONCE) ?? 'piece', when: parts.node('when'),
    range: findings.range(item.at.from, item.at.to),
  }
  return asks.length > 0 ? hold : null
}

function countOf(read: Reader, value: string, at: { from: number, to: number }): Ask[] {
  const [figure = '', question = ''] = splitCommas(value, 2)
  const is = read.expression(figure, at)
  if (is && question === '') read.findings.add('field-value', at, 'count: the figure, a comma, and the question: count: beads, How many beads?')
  return is ? [{ kind: 'count', is, question: readInline(question, read.findings, at) }] : []
}

function oneOf<T extends string>(read: Reader, parts: BlockParts, key: string, list: readonly T[]): T | null {
  const field = parts.field(key)
  if (!field) return null
  const found = list.find(one => one === field.value)
  if (found === undefined) read.findings.add('field-value', field.at, `${key}: ${field.value || 'nothing'} is none of ${list.join(', ')}.`)
  return found ?? null
}
