/** Everything the compiler can have to say, and where in the source it stands. */
import type { Finding, Range } from './schema'

/** The closed list. An error keeps a lesson from use; advice does not. */
export const CODES = {
  // the file
  'too-long': 'error', 'front-matter-missing': 'error', 'yaml': 'error', 'yaml-anchor': 'error', 'yaml-key': 'error', 'front-value': 'error', 'front-missing': 'error', 'flow-comma': 'error',
  // lines
  'unknown-keyword': 'error', 'keyword-colon': 'error', 'keyword-inside': 'error', 'indent-lost': 'error', 'unknown-field': 'error', 'field-value': 'error', 'deep-heading': 'error', 'underlined-heading': 'error', 'indented-code': 'error', 'raw-html': 'error',
  'step-missing': 'error', 'tab': 'advice', 'heading-space': 'advice',
  // names and figures
  'bad-name': 'error', 'duplicate-name': 'error', 'unknown-name': 'error', 'unknown-function': 'error', 'function-not-yet': 'error', 'expression': 'error', 'wrong-kind': 'error', 'figure-fails': 'error',
  'unknown-reading': 'error', 'unknown-figure': 'error', 'unknown-choice': 'error', 'usual-outside': 'error', 'repeat-not-count': 'error', 'repeat-range': 'error',
  // steps
  'duplicate-key': 'error', 'hold-no-consequence': 'error', 'hold-cannot-fail': 'error', 'hold-not-first': 'error', 'hold-after-deed': 'error', 'holds-without-when': 'error', 'hold-no-wrong': 'error',
  'choice-no-fault': 'error', 'choice-right-fault': 'error', 'choice-none-right': 'error', 'choice-count': 'error', 'fault-incomplete': 'error', 'torch-missing': 'error', 'permission-not-said': 'error',
  'picture-missing': 'error', 'picture-no-alt': 'error', 'picture-name': 'error', 'criterion-key': 'error', 'criterion-kind': 'error', 'unsafe-link': 'error', 'key-reused': 'error', 'unknown-drawing': 'error',
  // advice
  'note-without-consequence': 'advice', 'safety-late': 'advice', 'two-actions': 'advice', 'long-sentence': 'advice', 'long-choice': 'advice', 'left-right': 'advice', 'no-picture-no-measure': 'advice',
  'no-way-to-know': 'advice', 'no-practice': 'advice', 'tool-not-listed': 'advice', 'needs-unknown': 'advice', 'key-gone': 'advice', 'more-pictures': 'advice',
} as const satisfies Record<string, Finding['severity']>
export type Code = keyof typeof CODES

export interface Place { from: number, to: number }

/** Gathers findings of one source and knows its lines. */
export class Findings {
  readonly list: Finding[] = []
  private readonly starts: number[] = [0]

  constructor(readonly source: string) {
    for (let i = source.indexOf('\n'); i >= 0; i = source.indexOf('\n', i + 1)) this.starts.push(i + 1)
  }

  /** The line (from 1) an offset stands in. */
  lineOf(offset: number): number {
    let low = 0
    let high = this.starts.length - 1
    while (low < high) {
      const middle = (low + high + 1) >> 1
      if ((this.starts[middle] ?? 0) <= offset) low = middle
      else high = middle - 1
    }
    return low + 1
  }

  range(from: number, to: number): Range {
    return { from, to, line: this.lineOf(from) }
  }

  add(code: Code, at: Place, message: string, mend?: Finding['mend']): void {
    const line = this.lineOf(at.from)
    const found: Finding = { code, severity: CODES[code], message, from: at.from, to: Math.max(at.to, at.from), line, column: at.from - (this.starts[line - 1] ?? 0) + 1 }
    if (mend) found.mend = mend
    this.list.push(found)
  }

  /** Where a line has this finding, these others on it (or at the head of the file) only say the same again. */
  quiet(cause: Code, echoes: readonly Code[]): void {
    const lines = new Set(this.list.filter(finding => finding.code === cause).map(finding => finding.line))
    if (lines.size === 0) return
    const kept = this.list.filter(finding => !echoes.some(echo => echo === finding.code) || (finding.line > 1 && !lines.has(finding.line)))
    this.list.splice(0, this.list.length, ...kept)
  }

  /** In the order of the source. */
  sorted(): Finding[] {
    return [...this.list].sort((a, b) => a.from - b.from || a.to - b.to || (a.code < b.code ? -1 : 1))
  }
}

/** Names within two letters of what was written, the nearest first, three at most. */
export function nearNames(written: string, names: readonly string[]): string[] {
  return names.map(name => [distance(written.toLowerCase(), name.toLowerCase()), name] as const).filter(([far]) => far <= 2)
    .sort((a, b) => a[0] - b[0]).slice(0, 3).map(([, name]) => name)
}

/** Letters to change, add or take away (Levenshtein); long words are not compared. */
export function distance(a: string, b: string): number {
  if (Math.abs(a.length - b.length) > 2 || a.length > 40 || b.length > 40) return 99
  let row = Array.from({ length: b.length + 1 }, (_, i) => i)
  for (let i = 1; i <= a.length; i++) {
    const next = [i]
    for (let j = 1; j <= b.length; j++) next.push(Math.min((row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1, (row[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1)))
    row = next
  }
  return row[b.length] ?? 99
}

export const orNear = (near: readonly string[]): string => near.length > 0 ? ` Did you mean ${near.join(' or ')}?` : ''
