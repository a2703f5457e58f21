/** What each line of a lesson's text looks to be, for the tint behind it. What it means is the compiler's to say. */

export const LINE_KINDS = ['front', 'part', 'step', 'hold', 'safety', 'keyword', 'text'] as const
export type LineKind = (typeof LINE_KINDS)[number]

const HOLD = /^HOLD(?:\s|$)/
const SAFETY = /^(?:DANGER|WARNING|CAUTION|NOTICE)(?:\s|$)/
const KEYWORD = /^(?:CHECK|READING|PHOTO|WAIT|FAULT|DRAWING|WHY|FEEL)(?:\s|$)/

/** One kind for each line. What is indented under a keyword, with the empty lines inside it, is of its kind. */
export function lineKinds(lines: readonly string[]): LineKind[] {
  const frontEnd = lines[0]?.trimEnd() === '---' ? lines.findIndex((line, index) => index > 0 && line.trimEnd() === '---') : -1
  let block: LineKind = 'text'
  let fence = false
  return lines.map((line, index) => {
    if (index <= frontEnd) return 'front'
    if (line.startsWith('```')) fence = !fence
    const isInside = block !== 'text' && (/^[ \t]{2}/.test(line) || (line.trim() === '' && /^ {2}/.test(lines.slice(index + 1).find(next => next.trim() !== '') ?? '')))
    if (isInside) return block
    block = 'text'
    if (fence) return 'text'
    if (/^## /.test(line)) return 'step'
    if (/^# /.test(line)) return 'part'
    if (HOLD.test(line)) block = 'hold'
    else if (SAFETY.test(line)) block = 'safety'
    else if (KEYWORD.test(line)) block = 'keyword'
    return block
  })
}

export interface LinePart { text: string, mark: 'error' | 'advice' | null }

/** A line cut where findings begin and end; where two lie over each other, an error shows. `start` is the line's offset. */
export function lineParts(line: string, start: number, findings: readonly { from: number, to: number, severity: 'error' | 'advice' }[]): LinePart[] {
  const end = start + line.length
  const here = findings.filter(({ from, to }) => from < end && Math.max(to, from + 1) > start)
  const cuts = [...new Set([start, end, ...here.flatMap(({ from, to }) => [from, Math.max(to, from + 1)])])].filter(at => at >= start && at <= end).sort((a, b) => a - b)
  const markAt = (at: number): LinePart['mark'] => {
    const over = here.filter(({ from, to }) => from <= at && at < Math.max(to, from + 1))
    return over.find(one => one.severity === 'error')?.severity ?? over[0]?.severity ?? null
  }
  return cuts.slice(0, -1).map((at, index) => ({ text: line.slice(at - start, (cuts[index + 1] ?? end) - start), mark: markAt(at) }))
}
