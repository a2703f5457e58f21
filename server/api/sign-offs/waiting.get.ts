import { waitingToSign } from '#server/services/to-sign'

/** Judged and not signed, and where a second name is awaited. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'sign')
  return await waitingToSign(useDatabase(), who, now(event))
})
