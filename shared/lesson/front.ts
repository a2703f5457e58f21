/** The front matter: YAML 1.2 core, read entry by entry so that one bad entry leaves the rest. */
import { type Document, isAlias, isMap, isPair, isScalar, isSeq, type Pair, parseDocument, visit, type YAMLMap } from 'yaml'
import type { Findings, Place } from './findings'

export const LONGEST_FRONT = 64 * 1024

/** One value of the front matter, with where it stands and ways to read it that leave a finding behind. */
export interface Entry extends Place { key: string, keyAt: Place, value: Raw }
export type Raw =
  | { t: 'text', v: string, at: Place }
  | { t: 'number', v: number, text: string, at: Place }
  | { t: 'list', v: Raw[], at: Place }
  | { t: 'map', v: Entry[], at: Place }
  | { t: 'nothing', at: Place }

export interface Front { entries: Entry[], /** Offset of the text after it. */ bodyFrom: number, missing: boolean }

/** Splits the front matter off and reads it. Everything wrong is a finding; nothing throws. */
export function readFront(source: string, findings: Findings): Front {
  // An editor may have put a byte order mark before the first line.
  const open = /^\uFEFF?---[ \t]*\r?\n/.exec(source)
  const close = open ? /\r?\n---[ \t]*(\r?\n|$)/.exec(source.slice(open[0].length - 1)) : null
  if (!open || !close) {
    findings.add('front-matter-missing', { from: 0, to: Math.min(3, source.length) }, 'A lesson begins with a line of three hyphens, its front matter, and three hyphens again.')
    return { entries: [], bodyFrom: 0, missing: true }
  }
  const from = open[0].length
  const to = from - 1 + close.index
  const bodyFrom = from - 1 + close.index + close[0].length
  const text = source.slice(from, Math.max(from, to))
  if (text.length > LONGEST_FRONT) {
    findings.add('too-long', { from, to }, 'The front matter is longer than 64 KiB.')
    return { entries: [], bodyFrom, missing: false }
  }
  return { entries: entriesOf(text, from, findings), bodyFrom, missing: false }
}

function entriesOf(text: string, base: number, findings: Findings): Entry[] {
  const document: Document = parseDocument(text, { version: '1.2', schema: 'core', uniqueKeys: true, prettyErrors: false, logLevel: 'silent' })
  for (const fault of document.errors) {
    const [from, to] = fault.pos
    const nested = /Nested mappings|implicit keys|Implicit map/i.test(fault.message)
    findings.add('yaml', { from: base + from, to: base + to }, nested ? 'A “: ” inside a value makes this unreadable. Put the value in quotes.' : `This line of the front matter cannot be read: ${plainOf(fault.message)}`, nested ? quoteLine(text, base, from) : undefined)
  }
  if (forbidden(document, base, findings) || !isMap(document.contents)) return []
  return mapEntries(document.contents, base, text, findings)
}

const plainOf = (message: string): string => message.split('\n')[0]?.slice(0, 160) ?? ''

/** The mend of a nested mapping: quotes round the value of its line. */
function quoteLine(text: string, base: number, at: number): { from: number, to: number, text: string, says: string } | undefined {
  const start = text.lastIndexOf('\n', Math.max(0, at - 1)) + 1
  const end = text.indexOf('\n', start) < 0 ? text.length : text.indexOf('\n', start)
  const match = /^(\s*[a-z_]+:\s*)([^"'{[\n].*?)\s*$/.exec(text.slice(start, end))
  if (!match?.[1] || !match[2]) return undefined
  return { from: base + start + match[1].length, to: base + start + match[1].length + match[2].length, text: JSON.stringify(match[2]), says: 'Put it in quotes' }
}

/** Tags, anchors and aliases are off: they let a small file say very much. */
function forbidden(document: Document, base: number, findings: Findings): boolean {
  let found = false
  visit(document, (_, node) => {
    if (isPair(node) || node === null || typeof node !== 'object') return undefined
    const anchored = isAlias(node) || ('anchor' in node && typeof node.anchor === 'string') || ('tag' in node && typeof node.tag === 'string' && !node.tag.startsWith('tag:yaml.org,2002:'))
    if (!anchored || !('range' in node) || !Array.isArray(node.range)) return undefined
    findings.add('yaml-anchor', { from: base + Number(node.range[0]), to: base + Number(node.range[1]) }, 'Tags, anchors and aliases are not used in a lesson. Write the value out.')
    found = true
    return visit.BREAK
  })
  return found
}

function mapEntries(map: YAMLMap, base: number, text: string, findings: Findings): Entry[] {
  return map.items.flatMap((pair: Pair) => {
    if (!isScalar(pair.key)) return []
    const [from = 0, to = 0] = pair.key.range ?? []
    const keyAt = { from: base + from, to: base + to }
    const key = String(pair.key.value)
    if (pair.value === null || (isScalar(pair.value) && pair.value.value === null && pair.value.source === '')) {
      if (map.flow) {
        findings.add('flow-comma', keyAt, `“${key}” has no value. A comma inside { } or [ ] parts two entries: put the text it belongs to in quotes.`, quoteBefore(text, base, from, to))
        return []
      }
      return [{ key, keyAt, from: keyAt.from, to: keyAt.to, value: { t: 'nothing', at: keyAt } }]
    }
    const value = rawOf(pair.value, base, text, findings, keyAt)
    return [{ key, keyAt, from: keyAt.from, to: value.at.to, value }]
  })
}

/** The mend of a comma: quotes from the beginning of the value before it to the end of the part that was torn off. */
function quoteBefore(text: string, base: number, from: number, to: number): { from: number, to: number, text: string, says: string } | undefined {
  const before = /([a-z_][a-z0-9_ ]*:\s*)([^"'{}[\],\n]+,\s*)$/.exec(text.slice(Math.max(0, from - 300), from))
  if (!before?.[2]) return undefined
  const rest = /^[^}\],:\n]*(?:\([^)\n]*\))?/.exec(text.slice(from))?.[0].trimEnd() ?? text.slice(from, to)
  const start = from - before[2].length
  return { from: base + start, to: base + from + rest.length, text: JSON.stringify(text.slice(start, from + rest.length)), says: 'Put it in quotes' }
}

function rawOf(node: unknown, base: number, text: string, findings: Findings, near: Place): Raw {
  if (isScalar(node)) {
    const [from = 0, to = 0] = node.range ?? []
    const at = { from: base + from, to: base + to }
    if (typeof node.value === 'number') return { t: 'number', v: node.value, text: node.source ?? String(node.value), at }
    if (node.value === null) return { t: 'nothing', at }
    return { t: 'text', v: String(node.value), at }
  }
  if (isSeq(node)) {
    const [from = 0, to = 0] = node.range ?? []
    return { t: 'list', v: node.items.map(item => rawOf(item, base, text, findings, near)), at: { from: base + from, to: base + to } }
  }
  if (isMap(node)) {
    const [from = 0, to = 0] = node.range ?? []
    return { t: 'map', v: mapEntries(node, base, text, findings), at: { from: base + from, to: base + to } }
  }
  return { t: 'nothing', at: near }
}
