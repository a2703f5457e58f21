import type { H3Event } from 'h3'
import type { ServedPicture } from '#server/services/pictures'

/** Nothing in a picture may run or fetch, even when it is opened by itself. */
const POLICY = "default-src 'none'; style-src 'unsafe-inline'; sandbox"

/** Sends a kept picture. `forEver` for one whose address always means the same bytes. */
export function sendPicture(event: H3Event, { bytes, kind, sha }: ServedPicture, forEver: boolean): Buffer | null {
  setResponseHeaders(event, {
    'content-type': kind, 'content-security-policy': POLICY, 'x-content-type-options': 'nosniff', 'content-disposition': 'inline', 'etag': `"${sha}"`,
    'cache-control': forEver ? 'private, max-age=31536000, immutable' : 'private, no-cache',
  })
  if (getHeader(event, 'if-none-match') !== `"${sha}"`) return bytes
  setResponseStatus(event, 304)
  return null
}
