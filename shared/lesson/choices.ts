/** The question and choices of a HOLD or CHECK. */
import type { BlockParts, KeywordItem } from './body-blocks'
import type { Reader } from './read'
import type { Block, Choice } from './schema'
import type { Line } from './scan'
import { slugOf } from './slugs'
import { plainText, readInline, withoutCode } from './text'

export interface ReadChoices { question: Block[], choices: Choice[], fixed: boolean }

/** Everything before the first `right:` or `not:` is the question; a choice goes on over lines two spaces further in. */
export function readChoices(read: Reader, parts: BlockParts, item: KeywordItem): ReadChoices {
  const first = parts.rest.findIndex(line => isChoice(line))
  const question = parts.text(first < 0 ? parts.rest : parts.rest.slice(0, first))
  const order = parts.field('order')
  if (order && order.value !== 'fixed') read.findings.add('field-value', order.at, 'order: fixed, or leave it out.')
  const choices = first < 0 ? [] : choicesOf(read, parts.rest.slice(first))
  if (item.keyword === 'CHECK' || choices.length > 0) judge(read, choices, item)
  return { question, choices, fixed: order?.value === 'fixed' }
}

const isChoice = (line: Line): boolean => /^(right|not):(\s|$)/.test(line.text)

function choicesOf(read: Reader, lines: readonly Line[]): Choice[] {
  const joined: Line[] = []
  for (const line of lines) {
    const last = joined[joined.length - 1]
    if (last && !isChoice(line)) { if (line.text.trim()) joined[joined.length - 1] = { text: `${last.text} ${line.text.trim()}`, from: last.from, to: line.to } }
    else joined.push(line)
  }
  const taken = new Set<string>()
  return joined.map((line) => {
    const choice = choiceOf(read, line, taken)
    taken.add(choice.key)
    return choice
  })
}

function choiceOf(read: Reader, line: Line, taken: ReadonlySet<string>): Choice {
  const right = line.text.startsWith('right:')
  const text = line.text.replace(/^(right|not):\s*/, '')
  const start = line.to - text.length
  const at = { from: Math.max(line.from, start), to: line.to }
  const arrow = withoutCode(text).search(/(?<!\\) -> /)
  if (right && arrow >= 0) read.findings.add('choice-right-fault', { from: at.from + arrow, to: at.to }, 'A right choice has no fault behind it. Write \\-> if the arrow is text.')
  if (!right && arrow < 0) read.findings.add('choice-no-fault', at, 'A wrong choice names its fault and cure: not: text -> fault and cure.', { from: at.to, to: at.to, text: ' -> ', says: 'Add the arrow' })
  const told = (arrow >= 0 ? text.slice(0, arrow) : text).replaceAll('\\->', '->').trim()
  const says = readInline(told, read.findings, at)
  const fault = right ? null : readInline(arrow >= 0 ? text.slice(arrow + 4).trim() : '', read.findings, at)
  return { key: slugOf(plainText(says), taken), says, right, fault, range: read.findings.range(line.from, line.to) }
}

function judge(read: Reader, choices: readonly Choice[], item: KeywordItem): void {
  const right = choices.filter(choice => choice.right).length
  if (right === 0) read.findings.add('choice-none-right', item.at, 'One of the choices is right: right: text.')
  if (choices.length < 2 || choices.length > 6 || right === choices.length) read.findings.add('choice-count', item.at, 'There are two to six choices, and at least one of them is wrong (not: text -> fault and cure).')
}
