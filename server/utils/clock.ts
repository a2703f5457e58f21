import type { H3Event } from 'h3'

/** The moment a request came in: one for all that is done in it. */
export function now(event?: H3Event): Date {
  if (!event) return new Date()
  const known: unknown = event.context.receivedAt
  if (known instanceof Date) return known
  const received = new Date()
  event.context.receivedAt = received
  return received
}
