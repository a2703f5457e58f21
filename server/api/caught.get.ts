import { NOT_HERE, refuse } from '#server/services/refuse'

/** The letters the catcher on this machine holds. Not there at all anywhere else. */
export default defineEventHandler(async (event) => {
  const { catcherUrl } = useRuntimeConfig(event)
  if (!catcherUrl || !isLoopback(event)) refuse(404, NOT_HERE)
  return await caughtLetters(catcherUrl)
})
