const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])

/** A page of another origin cannot act here: what changes something comes from this origin, and as JSON or a picture. */
export default defineEventHandler((event) => {
  if (SAFE.has(event.method) || !event.path.startsWith('/api/')) return
  const site = getHeader(event, 'sec-fetch-site')
  const origin = getHeader(event, 'origin')
  const own = site ? site === 'same-origin' || site === 'none' : origin === undefined || isOwn(origin, getRequestHost(event, { xForwardedHost: true }))
  if (!own) throw createError({ statusCode: 403, message: 'This came from another site.' })
  const type = getHeader(event, 'content-type')?.split(';')[0]?.trim().toLowerCase() ?? ''
  const empty = Number(getHeader(event, 'content-length') ?? 0) === 0 && getHeader(event, 'transfer-encoding') === undefined
  if (!empty && type !== 'application/json' && !type.startsWith('image/') && type !== 'application/octet-stream') throw createError({ statusCode: 415, message: 'This is sent as JSON, or as a picture.' })
})

function isOwn(origin: string, host: string): boolean {
  return URL.canParse(origin) && new URL(origin).host === host
}
