/** Edits of a text as the keys of the writing page make them. Offsets are UTF-16 units, as a textarea counts. */

export interface TextEdit {
  from: number
  to: number
  text: string
  /** The selection afterwards. */
  select: [number, number]
}

const INDENT = '  '
const KEYWORD_LINE = /^(?:DANGER|WARNING|CAUTION|NOTICE|HOLD|CHECK|READING|PHOTO|WAIT|FAULT|DRAWING|WHY|FEEL)(?:\s|$)/

// lastIndexOf reads a place before the beginning as the beginning itself.
export const lineStart = (text: string, at: number): number => (at <= 0 ? 0 : text.lastIndexOf('\n', at - 1) + 1)
export const lineEnd = (text: string, at: number): number => {
  const end = text.indexOf('\n', at)
  return end === -1 ? text.length : end
}

/** The number of the line an offset is in, from 1. */
export function lineAt(text: string, at: number): number {
  let line = 1
  for (let next = text.indexOf('\n'); next !== -1 && next < at; next = text.indexOf('\n', next + 1)) line++
  return line
}

/** Every line a selection touches; one that ends at a line's very beginning does not touch that line. */
function touched(text: string, from: number, to: number): { start: number, end: number, lines: string[] } {
  const start = lineStart(text, from)
  const end = lineEnd(text, to > from && text[to - 1] === '\n' ? to - 1 : to)
  return { start, end, lines: text.slice(start, end).split('\n') }
}

/** Two spaces further in; an empty line stays empty. */
export function indent(text: string, from: number, to: number): TextEdit {
  const { start, end, lines } = touched(text, from, to)
  const next = lines.map(line => (line === '' && lines.length > 1 ? line : INDENT + line)).join('\n')
  const grown = next.length - (end - start)
  return { from: start, to: end, text: next, select: from === to ? [from + INDENT.length, to + INDENT.length] : [start, to + grown] }
}

/** Two spaces further out, or one where there is but one; null where no line is indented. */
export function outdent(text: string, from: number, to: number): TextEdit | null {
  const { start, end, lines } = touched(text, from, to)
  const next = lines.map(line => line.replace(/^(?: {1,2}|\t)/, '')).join('\n')
  const shrunk = end - start - next.length
  if (shrunk === 0) return null
  return { from: start, to: end, text: next, select: from === to ? [Math.max(start, from - shrunk), Math.max(start, to - shrunk)] : [start, to - shrunk] }
}

/**
 * Enter: the new line stands as far in as the one before, two further under a keyword, and on an indented line with
 * nothing in it goes back to the margin. Null where the plain key does the same.
 */
export function newLine(text: string, from: number, to: number): TextEdit | null {
  const start = lineStart(text, from)
  const before = text.slice(start, from)
  const space = /^ */.exec(before)?.[0] ?? ''
  if (before === space && space !== '' && lineEnd(text, to) === to) return { from: start, to, text: '', select: [start, start] }
  const next = KEYWORD_LINE.test(before) ? INDENT : space
  if (next === '') return null
  return { from, to, text: `\n${next}`, select: [from + 1 + next.length, from + 1 + next.length] }
}
