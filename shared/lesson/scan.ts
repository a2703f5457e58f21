/** Cuts the body of a lesson into headings, keyword blocks and text, line by line, each with where it stands. */
import { type Findings, nearNames, type Place } from './findings'

export const KEYWORDS = ['DANGER', 'WARNING', 'CAUTION', 'NOTICE', 'HOLD', 'CHECK', 'READING', 'PHOTO', 'WAIT', 'FAULT', 'DRAWING', 'WHY', 'FEEL'] as const
export type Keyword = (typeof KEYWORDS)[number]

/** Fields of each keyword's block; `right` and `not` are its choices. */
export const KEYWORD_FIELDS: Record<Keyword, readonly string[]> = {
  DANGER: ['when'], WARNING: ['when'], CAUTION: ['when'], NOTICE: ['when'],
  HOLD: ['count', 'measure', 'photo', 'wrong', 'witness', 'once', 'order', 'when'], CHECK: ['order', 'when'],
  READING: ['when'], PHOTO: ['when'], WAIT: ['why', 'when'], FAULT: ['because', 'do', 'key', 'when'],
  DRAWING: ['length', 'marks', 'inside', 'wire', 'neck', 'bead', 'turns', 'core', 'hole', 'eye', 'beads', 'knot', 'clasp', 'stock', 'lengths', 'when'], WHY: ['when'], FEEL: ['when'],
}
const CHOICES = ['right', 'not']

export interface Line extends Place { text: string }
export interface Field { key: string, keyAt: Place, value: string, at: Place }
export type Item =
  | { t: 'heading', depth: 1 | 2, title: string, at: Place, titleAt: Place, fields: Field[] }
  | { t: 'block', keyword: Keyword, title: string, at: Place, titleAt: Place, lines: Line[] }
  | { t: 'text', lines: Line[], at: Place }

export const PART_FIELDS = ['key', 'repeat', 'say', 'order', 'when', 'stop']
export const STEP_FIELDS = ['key', 'repeat', 'say', 'when', 'stop', 'one_act', 'heat', 'usual', 'needs', 'instead']
const isKeyword = (word: string): word is Keyword => (KEYWORDS as readonly string[]).includes(word)
const blank = (line: Line | undefined): boolean => line === undefined || /^\s*$/.test(line.text)
const indented = (line: Line | undefined): boolean => line !== undefined && /^( {2}|\t)/.test(line.text)

export function linesOf(source: string, from: number): Line[] {
  const lines: Line[] = []
  for (let at = from; at <= source.length;) {
    const end = source.indexOf('\n', at)
    const to = end < 0 ? source.length : end
    lines.push({ text: source.slice(at, to).replace(/\r$/, ''), from: at, to })
    if (end < 0) break
    at = end + 1
  }
  return lines
}

/** Walks the lines once. */
export function scan(source: string, from: number, findings: Findings): Item[] {
  const lines = linesOf(source, from)
  const items: Item[] = []
  let fence: string | null = null
  for (let i = 0; i < lines.length;) {
    const line = lines[i]
    if (!line) break
    const mark = /^ {0,3}(```+|~~~+)/.exec(line.text)?.[1] ?? null
    if (fence !== null || mark !== null) {
      if (fence === null) fence = mark?.slice(0, 3) ?? null
      else if (mark?.startsWith(fence)) fence = null
      i = addText(items, line, i)
      continue
    }
    const heading = /^(#{1,6})(?:[ \t]+(.*?))?(?:[ \t]+#*)?$/.exec(line.text)
    if (heading?.[1] && (heading[2] !== undefined || line.text === heading[1])) { i = headingAt(lines, i, heading[1].length, heading[2] ?? '', items, findings); continue }
    if (/^#{1,6}[^\s#]/.test(line.text)) findings.add('heading-space', line, 'A heading has a space after its #.', { from: line.from, to: line.to, text: line.text.replace(/^(#+)/, '$1 '), says: 'Put a space in' })
    notUsed(lines, i, items, findings)
    const keyword = keywordOf(line, lines[i + 1], findings)
    i = keyword ? blockAt(lines, i, keyword, items, findings) : addText(items, line, i)
  }
  return items
}

/** What CommonMark knows and a lesson does not: headings by a line beneath, code by four spaces. It is read as text. */
function notUsed(lines: readonly Line[], i: number, items: readonly Item[], findings: Findings): void {
  const [line, before] = [lines[i], lines[i - 1]]
  const last = items[items.length - 1]
  if (!line || !before || last?.t !== 'text') return
  const isUnderText = !blank(before) && last.lines[last.lines.length - 1]?.from === before.from
  if (isUnderText && /^ {0,3}(=+|-{2,})[ \t]*$/.test(line.text)) findings.add('underlined-heading', line, 'A heading is not made by a line beneath it. Write # or ## before its words.')
  const inList = last.lines.some(({ text }) => /^ *(?:[-*+]|\d+[.)])[ \t]/.test(text))
  if (blank(before) && !inList && /^ {4,}\S/.test(line.text)) findings.add('indented-code', { from: line.from + line.text.search(/\S/), to: line.to }, 'Four spaces make no code here. Take them away, or put ``` before and after.')
}

function addText(items: Item[], line: Line, i: number): number {
  const last = items[items.length - 1]
  const plain = { ...line, text: line.text.replace(/^\\(?=[A-Z]{3,}(\s|:|$))/, '') }
  if (last?.t === 'text') { last.lines.push(plain); last.at.to = line.to }
  else items.push({ t: 'text', lines: [plain], at: { from: line.from, to: line.to } })
  return i + 1
}

function headingAt(lines: readonly Line[], i: number, depth: number, title: string, items: Item[], findings: Findings): number {
  const line = lines[i]
  if (!line) return i + 1
  if (depth > 2) findings.add('deep-heading', line, 'There are parts (#) and steps (##) and nothing deeper.')
  const known = depth === 1 ? PART_FIELDS : STEP_FIELDS
  const { fields, next } = fieldsAt(lines, i + 1, known, findings)
  const start = line.from + line.text.indexOf(title)
  items.push({ t: 'heading', depth: depth === 1 ? 1 : 2, title, at: { from: line.from, to: line.to }, titleAt: { from: start, to: start + title.length }, fields })
  return next
}

/** One `key: value` a line, up to an empty line or the first line that is none; two spaces further in goes on. */
export function fieldsAt(lines: readonly Line[], from: number, known: readonly string[], findings: Findings, stopAt: readonly string[] = []): { fields: Field[], next: number } {
  const fields: Field[] = []
  let i = from
  for (; i < lines.length; i++) {
    const line = lines[i]
    if (!line || blank(line)) break
    const last = fields[fields.length - 1]
    if (last && indented(line)) { last.value = `${last.value} ${line.text.trim()}`.trim(); last.at.to = line.to; continue }
    const match = /^([a-z][a-z_]*):(?:[ \t]+(.*))?$/.exec(line.text)
    const key = match?.[1]
    if (!match || key === undefined || stopAt.includes(key)) break
    const start = line.to - (match[2]?.length ?? 0)
    const keyAt = { from: line.to - line.text.length, to: line.to - line.text.length + key.length }
    if (known.includes(key)) fields.push({ key, keyAt, value: (match[2] ?? '').trim(), at: { from: start, to: line.to } })
    else findings.add('unknown-field', keyAt, `“${key}” is no field here.${nearOf(key, known)} If it is text, leave an empty line before it.`)
  }
  return { fields, next: i }
}

const nearOf = (key: string, known: readonly string[]): string => {
  const near = nearNames(key, known)
  return near.length > 0 ? ` Did you mean ${near.join(' or ')}?` : ` There is ${known.join(', ')}.`
}

/** Is this line a keyword's? Says what it thinks of a near miss. */
function keywordOf(line: Line, next: Line | undefined, findings: Findings): { word: Keyword, rest: string } | null {
  const match = /^([A-Z]{3,})(:?)(?:[ \t]+(.*))?$/.exec(line.text)
  if (!match?.[1]) {
    const inside = /^\s*(?:[-*+>]|\d+[.)])\s+([A-Z]{3,})(?=\s|$)/.exec(line.text)?.[1]
    if (inside && isKeyword(inside)) findings.add('keyword-inside', line, `${inside} stands at the left margin, not inside a list or a quotation.`)
    return null
  }
  const word = match[1]
  if (isKeyword(word)) {
    if (match[2]) findings.add('keyword-colon', { from: line.from + word.length, to: line.from + word.length + 1 }, `${word} has no colon behind it.`, { from: line.from + word.length, to: line.from + word.length + 1, text: '', says: 'Take the colon out' })
    return { word, rest: (match[3] ?? '').trim() }
  }
  if (word.length < 4 || match[2]) return null
  const near = nearNames(word, KEYWORDS)
  if (near.length > 0 || (indented(next) && !blank(next))) {
    const [first] = near
    findings.add('unknown-keyword', { from: line.from, to: line.from + word.length }, `${word} is no keyword.${near.length > 0 ? ` Did you mean ${near.join(' or ')}?` : ` There is ${KEYWORDS.join(', ')}.`} Write \\${word} if it is text.`,
      first ? { from: line.from, to: line.from + word.length, text: first, says: `Write ${first}` } : undefined)
  }
  return null
}

/** A keyword's block: what is indented under it, empty lines inside, and what lost its indent right under it. */
function blockAt(lines: readonly Line[], at: number, { word, rest }: { word: Keyword, rest: string }, items: Item[], findings: Findings): number {
  const head = lines[at]
  if (!head) return at + 1
  const body: Line[] = []
  let i = at + 1
  for (; i < lines.length; i++) {
    const line = lines[i]
    if (!line) break
    if (blank(line)) {
      const ahead = lines.slice(i, i + 60).find(one => !blank(one))
      if (!indented(ahead)) break
      body.push({ ...line, text: '' })
    }
    else if (indented(line)) body.push(unindented(line, findings))
    else if (isLost(word, line)) {
      findings.add('indent-lost', line, `This belongs to the ${word} above it: begin the line with two spaces.`, { from: line.from, to: line.from, text: '  ', says: 'Put two spaces in' })
      body.push(line)
    }
    else break
  }
  while (body.length > 0 && blank(body[body.length - 1])) body.pop()
  const title = head.from + head.text.length - (rest ? head.text.trimEnd().length - head.text.lastIndexOf(rest) : 0)
  const titleFrom = rest ? head.from + head.text.indexOf(rest, word.length) : title
  items.push({ t: 'block', keyword: word, title: rest, at: { from: head.from, to: body[body.length - 1]?.to ?? head.to }, titleAt: { from: titleFrom, to: titleFrom + rest.length }, lines: body })
  return i
}

function isLost(word: Keyword, line: Line): boolean {
  const key = /^([a-z_]+):(\s|$)/.exec(line.text)?.[1]
  return key !== undefined && [...KEYWORD_FIELDS[word], ...(word === 'HOLD' || word === 'CHECK' ? CHOICES : [])].includes(key)
}

function unindented(line: Line, findings: Findings): Line {
  const tab = line.text.indexOf('\t')
  if (tab >= 0 && /^[ \t]*$/.test(line.text.slice(0, tab))) findings.add('tab', { from: line.from + tab, to: line.from + tab + 1 }, 'A tab is read as two spaces.', { from: line.from + tab, to: line.from + tab + 1, text: '  ', says: 'Write two spaces' })
  const wide = line.text.replace(/^\t/, '  ')
  return { text: wide.slice(2), from: line.from, to: line.to }
}
