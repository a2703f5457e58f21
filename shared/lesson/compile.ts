/**
 * Compiles a lesson file into a Lesson, with everything that is to be said about it. Never throws and knows no clock; after
 * an error it goes on with what can be read. Limits are counts.
 */
import { readBody } from './body'
import { Findings } from './findings'
import { readFront } from './front'
import { readHead } from './head'
import { badFigures } from './head-figures'
import { find, Reader } from './read'
import type { CompileOptions, Context } from './rules/context'
import { RULES } from './rules/index'
import type { Compiled, Kind } from './schema'

export type { CompileOptions } from './rules/context'
/** In UTF-16 units; more is not read. */
export const LONGEST_SOURCE = 256 * 1024
const MOST_LINES = 4000
const MOST_NAMES = 64

export function compile(whole: string, options: CompileOptions = {}): Compiled {
  const source = cut(whole)
  const findings = new Findings(source)
  if (source.length < whole.length) findings.add('too-long', { from: source.length, to: source.length }, `A lesson is at most 256 KiB and ${MOST_LINES} lines. What comes after is not read.`)
  const front = readFront(source, findings)
  const head = readHead(front.entries, findings, front.missing)
  findings.quiet('yaml', ['front-missing', 'front-value'])
  const { sighted, ...body } = readBody(source, front.bodyFrom, findings)
  const lesson = { ...head, ...body }
  if (lesson.sizes.length + lesson.figures.length > MOST_NAMES) findings.add('too-long', { from: 0, to: 3 }, `A lesson has at most ${MOST_NAMES} sizes and figures.`)
  const kinds = new Map<string, Kind | null>(badFigures(new Reader(new Findings('')), find(front.entries, 'figures'), head.figures).map(name => [name, null]))
  const context: Context = { source, lesson, sighted, findings, kinds, options, add: (code, at, message, mend) => findings.add(code, at, message, mend) }
  if (lesson.sizes.length + lesson.figures.length <= MOST_NAMES) for (const rule of RULES) rule(context)
  return { lesson, findings: findings.sorted() }
}

function cut(source: string): string {
  let end = Math.min(source.length, LONGEST_SOURCE)
  for (let i = source.indexOf('\n'), line = 1; i >= 0 && i < end; i = source.indexOf('\n', i + 1), line++) if (line >= MOST_LINES) end = i
  return source.slice(0, end)
}

/** The findings that keep a lesson from use. */
export const errorsOf = (compiled: Compiled) => compiled.findings.filter(finding => finding.severity === 'error')
