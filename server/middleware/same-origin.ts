import type { H3Event } from 'h3'

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])
/** Where a picture may be sent; everything else that changes something is JSON, which no form of another site can send. */
const PICTURES = [/^\/api\/photos\//, /^\/api\/lessons\/[^/]+\/pictures(?:\?|$)/]

/** A page of another origin cannot act here: what changes something comes from this origin, and as JSON or a picture. */
export default defineEventHandler((event) => {
  if (SAFE.has(event.method)) return
  if (!isOwn(event)) throw createError({ statusCode: 403, message: 'This came from another site and was not done.' })
  const type = getHeader(event, 'content-type')?.split(';')[0]?.trim().toLowerCase() ?? ''
  const isEmpty = type === '' && Number(getHeader(event, 'content-length') ?? 0) === 0 && getHeader(event, 'transfer-encoding') === undefined
  if (!isEmpty && !isTaken(event.path, type)) throw createError({ statusCode: 415, message: 'This is sent as JSON, or as a picture.' })
})

const isTaken = (path: string, type: string): boolean =>
  type === 'application/json' || ((type.startsWith('image/') || type === 'application/octet-stream') && PICTURES.some(at => at.test(path)))

/** By Sec-Fetch-Site, which no page can set; else by Origin. A browser sends one of the two; what sends neither holds no cookie of anybody else. */
function isOwn(event: H3Event): boolean {
  const site = getHeader(event, 'sec-fetch-site')
  if (site) return site === 'same-origin' || site === 'none'
  const origin = getHeader(event, 'origin')
  if (origin === undefined) return true
  return URL.canParse(origin) && [getRequestHost(event), new URL(useRuntimeConfig(event).publicUrl).host].includes(new URL(origin).host)
}
