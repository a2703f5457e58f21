import type { H3Event } from 'h3'
import { refuse } from '#server/services/refuse'

/** The bytes of a body, at most `most`: what is longer is refused as it comes in, whether or not it told its length. */
export async function readBytes(event: H3Event, most: number, says: string): Promise<Buffer> {
  if (Number(getHeader(event, 'content-length') ?? 0) > most) refuse(413, says)
  const parts: Buffer[] = []
  let length = 0
  for await (const part of event.node.req) {
    const bytes = Buffer.from(part)
    length += bytes.length
    if (length > most) refuse(413, says)
    parts.push(bytes)
  }
  return Buffer.concat(parts)
}
