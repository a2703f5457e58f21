import type { H3Event } from 'h3'
import type { Door } from '#server/services/come-in'
import { endSession, type SessionKey } from '#server/services/sessions'

/** What coming in asks of a request. */
export function doorOf(event: H3Event): Door {
  return { db: useDatabase(), passwords: usePasswords(), address: addressOf(event), agent: getHeader(event, 'user-agent') ?? '', now: now(event) }
}

/** Seals the key into a new cookie, and ends what the old one opened. Nothing but the key is ever put into it. */
export async function letIn(event: H3Event, key: SessionKey): Promise<void> {
  const before = await sessionKey(event)
  if (before) await endSession(useDatabase(), before.session, now(event))
  await replaceUserSession(event, { secure: key })
}
