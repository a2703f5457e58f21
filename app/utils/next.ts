/** Where to go after coming in: a path of this studio that begins with one slash, else home. Never another site, whatever the address says. */
export function nextPath(told: unknown): string {
  const path = Array.isArray(told) ? told[0] : told
  if (typeof path !== 'string' || !/^\/(?![/\\])[^\\\p{Cc}]*$/u.test(path)) return '/'
  return /^\/come-in(?:[/?#]|$)/.test(path) ? '/' : path
}
