/** A key (`a-z 0-9 -`, up to 40) made from words, another one when it is taken. */
export function slugOf(words: string, taken: ReadonlySet<string> = new Set()): string {
  const plain = words.normalize('NFKD').toLowerCase().replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, 40).replace(/-+$/, '') || 'x'
  for (let n = 1; ; n++) {
    const key = n === 1 ? plain : `${plain.slice(0, 40 - String(n).length - 1)}-${n}`
    if (!taken.has(key)) return key
  }
}
export const isKey = (text: string): boolean => /^[a-z0-9-]{1,40}$/.test(text)
