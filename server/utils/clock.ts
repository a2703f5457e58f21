import type { H3Event } from 'h3'

/** The moment a request came in: one for all that is done in it. */
export function now(event?: H3Event): Date {
  if (!event) return new Date()
  const context: { receivedAt?: Date } = event.context
  context.receivedAt ??= new Date()
  return context.receivedAt
}
