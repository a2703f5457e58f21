/** A lesson's title and the address made from it. */
import { slugOf } from './slugs'

/** Addresses the pages need for themselves. */
const TAKEN_BY_PAGES = ['new']

/** The slug of a title that none of the taken ones has: small letters, digits, hyphens, at most 40; accents fall off. */
export function freeSlug(title: string, taken: Iterable<string>): string {
  return slugOf(title.normalize('NFKD').replace(/\p{M}/gu, ''), new Set([...TAKEN_BY_PAGES, ...taken]))
}

/** The title a half-written source gives itself, or null. Reads one line and understands no more YAML than quotes and a comment. */
export function titleOf(source: string): string | null {
  const value = /^title:[ \t]*(.+?)[ \t]*$/m.exec(source.slice(0, 8000).replace(/\r\n?/g, '\n'))?.[1]
  if (!value) return null
  const quoted = /^(?:"((?:[^"\\]|\\.)*)"|'((?:[^']|'')*)')/.exec(value)
  const title = quoted ? (quoted[1]?.replace(/\\(.)/g, '$1') ?? quoted[2]?.replace(/''/g, '\'') ?? '') : value.replace(/\s+#.*$/, '')
  return title.trim() === '' ? null : title.trim()
}
