import { endSession } from '#server/services/sessions'

/** Leaves: the cookie goes, and what it opened is ended, so that a copy of it opens nothing. Done twice is done. */
export default defineEventHandler(async (event) => {
  const key = await sessionKey(event)
  if (key) {
    await endSession(useDatabase(), key.session, now(event))
    await clearUserSession(event)
  }
  return { finished: true }
})
