import type { H3Event } from 'h3'

const LOOPBACK = /^(?:::1|(?:::ffff:)?127(?:\.\d{1,3}){3})$/

/** Did this come from this machine itself? Judged by the connection, never by a header. */
export function isLoopback(event: H3Event): boolean {
  return LOOPBACK.test(event.node.req.socket.remoteAddress ?? '')
}

/**
 * Where a request comes from, for the limits on guessing. X-Forwarded-For is what anybody may write, so it counts only
 * where NUXT_PROXY_HOPS says how many proxies of our own stand in front: the entry the outermost of them wrote.
 */
export function addressOf(event: H3Event): string {
  const own = event.node.req.socket.remoteAddress ?? 'unknown'
  const hops = Number(useRuntimeConfig(event).proxyHops)
  if (!(hops >= 1)) return own
  const told = (getHeader(event, 'x-forwarded-for') ?? '').split(',').map(part => part.trim()).filter(Boolean)
  return told.at(-hops) ?? own
}
