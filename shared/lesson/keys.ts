/** Writes the keys of parts and steps into a source, so that a step whose title changes later is still the same step. */
import type { Lesson } from './schema'

export interface KeyEdit {
  /** Where the line goes in; nothing is taken out. */
  at: number
  text: string
  key: string
  title: string
}

const FIELD = /^[a-z_]+( [a-z0-9]+)*:(\s|$)/
const lineEnd = (source: string, from: number): number => {
  const end = source.indexOf('\n', from)
  return end === -1 ? source.length : end
}

/** Does a `key:` stand among the fields right under the heading that ends at `end`? */
function hasKey(source: string, end: number): boolean {
  let at = end + 1
  while (at < source.length) {
    const stop = lineEnd(source, at)
    const line = source.slice(at, stop).replace(/\r$/, '')
    if (/^key:(\s|$)/.test(line)) return true
    if (!FIELD.test(line) && !/^ {2,}\S/.test(line)) return false
    at = stop + 1
  }
  return false
}

/** The edits that write in the key of every part and step that has none yet, in the order of the file. */
export function keyEdits(source: string, lesson: Lesson): KeyEdit[] {
  const newline = source.includes('\r\n') ? '\r\n' : '\n'
  // A lesson without parts has one that no heading stands for: it is told by the marks of the heading.
  const headed = lesson.parts.flatMap(part => [{ key: part.key, from: part.range.from, marks: '#' }, ...part.steps.map(step => ({ key: step.key, from: step.range.from, marks: '##' }))])
  return headed.sort((a, b) => a.from - b.from).flatMap(({ key, from, marks }) => {
    const end = lineEnd(source, from)
    const heading = /^ {0,3}(#{1,2})[ \t]+(.*?)\r?$/.exec(source.slice(from, end))
    if (heading?.[1] !== marks || hasKey(source, end)) return []
    const isLast = end === source.length
    return [{ at: isLast ? end : end + 1, text: isLast ? `${newline}key: ${key}` : `key: ${key}${newline}`, key, title: heading[2] ?? '' }]
  })
}

/** The source with those lines in it. Writing keys twice changes nothing more. */
export function writeKeys(source: string, edits: readonly KeyEdit[]): string {
  return [...edits].sort((a, b) => b.at - a.at).reduce((text, edit) => text.slice(0, edit.at) + edit.text + text.slice(edit.at), source)
}
