/** One keyword's block as the part of a step it is. */
import { readHold } from './body-hold'
import { readChoices } from './choices'
import type { Place } from './findings'
import type { Reader } from './read'
import { type Block, DRAWINGS, type Inline, type Node, type Step } from './schema'
import { type Field, fieldsAt, type Item, KEYWORD_FIELDS, type Line } from './scan'
import { slugOf } from './slugs'
import { plainText, readInline, readText } from './text'

export type KeywordItem = Extract<Item, { t: 'block' }>
export interface BlockParts { fields: Field[], rest: Line[], field: (key: string) => Field | undefined, node: (key: string) => Node | null, inline: (key: string) => Inline[] | null, text: (lines: readonly Line[]) => Block[] }

/** The fields at the head of a block and the lines after them. */
export function partsOf(read: Reader, item: KeywordItem): BlockParts {
  const { fields, next } = fieldsAt(item.lines, 0, KEYWORD_FIELDS[item.keyword], read.findings, ['right', 'not'])
  const field = (key: string) => fields.findLast(one => one.key === key)
  return {
    fields, rest: item.lines.slice(next), field,
    node: (key) => { const found = field(key); return found ? read.expression(found.value, found.at) : null },
    inline: (key) => { const found = field(key); return found ? readInline(found.value, read.findings, found.at) : null },
    text: lines => textOf(read, lines),
  }
}

export function textOf(read: Reader, lines: readonly Line[]): Block[] {
  const [first] = lines
  const last = lines[lines.length - 1]
  if (!first || !last) return []
  return readText({ text: lines.map(line => line.text).join('\n'), at: { from: first.from, to: last.to } }, read.findings).blocks
}

/** Puts one block into its step. */
export function readBlock(read: Reader, item: KeywordItem, step: Step, faultKeys: Set<string>): void {
  const { findings } = read
  const parts = partsOf(read, item)
  const range = findings.range(item.at.from, item.at.to)
  const when = parts.node('when')
  const title = () => readInline(item.title, findings, item.titleAt)
  switch (item.keyword) {
    case 'DANGER': case 'WARNING': case 'CAUTION': case 'NOTICE': step.safety.push({ word: item.keyword, hazard: title(), avoid: parts.text(parts.rest), when, range }); break
    case 'HOLD': { const hold = readHold(read, item, parts); if (hold) step.holds.push(hold); break }
    case 'CHECK': {
      const { question, choices, fixed } = readChoices(read, parts, item)
      step.checks.push({ question: item.title ? [{ t: 'p', c: title() }, ...question] : question, choices, fixed, when, range })
      break
    }
    case 'READING': step.readings.push({ reading: item.title, text: parts.text(parts.rest), when, range: findings.range(item.titleAt.from, item.titleAt.to) }); break
    case 'PHOTO': step.photos.push({ prompt: title(), when, range }); break
    case 'WAIT': { const length = read.expression(item.title, item.titleAt); if (length) step.waits.push({ length, why: parts.inline('why'), when, range: findings.range(item.titleAt.from, item.titleAt.to) }); break }
    case 'FAULT': readFault(read, item, parts, step, faultKeys); break
    case 'DRAWING': readDrawing(read, item, parts, step); break
    case 'WHY': case 'FEEL': step[item.keyword === 'WHY' ? 'why' : 'feel'].push({ text: [...(item.title ? [{ t: 'p' as const, c: title() }] : []), ...parts.text(parts.rest)], when, range }); break
  }
}

function readFault(read: Reader, item: KeywordItem, parts: BlockParts, step: Step, keys: Set<string>): void {
  const sees = readInline(item.title, read.findings, item.titleAt)
  const because = parts.inline('because')
  const cure = parts.inline('do')
  if (!because?.length || !cure?.length || item.title === '') read.findings.add('fault-incomplete', item.at, 'A FAULT says what you see, because: why, and do: the cure.')
  const key = parts.field('key')?.value || slugOf(plainText(sees), keys)
  keys.add(key)
  step.faults.push({ key, sees, because: because ?? [], do: cure ?? [], when: parts.node('when'), range: read.findings.range(item.at.from, item.at.to) })
}

function readDrawing(read: Reader, item: KeywordItem, parts: BlockParts, step: Step): void {
  const kind = DRAWINGS.find(one => one === item.title)
  if (!kind) { read.findings.add('unknown-drawing', item.titleAt, `“${item.title}” is no drawing. There is ${DRAWINGS.join(', ')}.`); return }
  const args: Record<string, Node[]> = {}
  for (const { key, value, at } of parts.fields) {
    if (key === 'when') continue
    args[key] = splitCommas(value).flatMap((text) => { const node = read.expression(text, at); return node ? [node] : [] })
  }
  step.drawings.push({ kind, args, when: parts.node('when'), range: read.findings.range(item.at.from, item.at.to) })
}

/** Splits at commas that stand in no bracket. */
export function splitCommas(text: string, most = Number.POSITIVE_INFINITY): string[] {
  const out: string[] = []
  let depth = 0
  let start = 0
  for (let i = 0; i < text.length; i++) {
    if (text[i] === '(') depth++
    else if (text[i] === ')') depth--
    else if (text[i] === ',' && depth === 0 && out.length < most - 1) { out.push(text.slice(start, i).trim()); start = i + 1 }
  }
  out.push(text.slice(start).trim())
  return out
}

export const placeOfLines = (lines: readonly Line[], or: Place): Place => ({ from: lines[0]?.from ?? or.from, to: lines[lines.length - 1]?.to ?? or.to })
