import type { H3Event } from 'h3'

declare module 'h3' {
  interface H3EventContext { receivedAt?: Date }
}

/** A test says in this header what time it is to be. Read only where NUXT_TEST_CLOCK is set, and from this machine. */
const CLOCK_HEADER = 'x-thirdhand-now'

/** The moment a request came in: one for all that is done in it. */
export function now(event?: H3Event): Date {
  if (!event) return new Date()
  event.context.receivedAt ??= toldTime(event) ?? new Date()
  return event.context.receivedAt
}

function toldTime(event: H3Event): Date | null {
  if (!useRuntimeConfig(event).testClock || !isLoopback(event)) return null
  const told = new Date(getHeader(event, CLOCK_HEADER) ?? '')
  return Number.isNaN(told.getTime()) ? null : told
}
