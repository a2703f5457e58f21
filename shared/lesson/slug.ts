/** Addresses of a lesson made from its title. */

const MOST = 40
/** Addresses the pages need for themselves. */
const TAKEN_BY_PAGES = new Set(['new'])

/** Small letters, digits and hyphens, at most 40: "Wrapped-loop link" is wrapped-loop-link. Accents fall off; nothing left gives `lesson`. */
export function slugOf(title: string): string {
  const plain = title.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase().replace(/[^a-z0-9]+/g, '-').slice(0, MOST).replace(/^-+|-+$/g, '')
  return plain === '' ? 'lesson' : plain
}

/** The slug of a title that none of the taken ones has: the second is `-2`. */
export function freeSlug(title: string, taken: ReadonlySet<string>): string {
  const first = slugOf(title)
  for (let n = 1; ; n++) {
    const tail = n === 1 ? '' : `-${n}`
    const slug = first.slice(0, MOST - tail.length).replace(/-+$/, '') + tail
    if (!taken.has(slug) && !TAKEN_BY_PAGES.has(slug)) return slug
  }
}

/** The title a half-written source gives itself, or null. Reads one line and understands no more YAML than quotes and a comment. */
export function titleOf(source: string): string | null {
  const value = /^title:[ \t]*(.+?)[ \t]*$/m.exec(source.slice(0, 8000).replace(/\r\n?/g, '\n'))?.[1]
  if (!value) return null
  const quoted = /^(?:"((?:[^"\\]|\\.)*)"|'((?:[^']|'')*)')/.exec(value)
  const title = quoted ? (quoted[1]?.replace(/\\(.)/g, '$1') ?? quoted[2]?.replace(/''/g, '\'') ?? '') : value.replace(/\s+#.*$/, '')
  return title.trim() === '' ? null : title.trim()
}
