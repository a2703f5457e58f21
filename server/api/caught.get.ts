import { refuse } from '#server/services/refuse'

/** The letters the catcher on this machine holds. Not there at all anywhere else. */
export default defineEventHandler(async (event) => {
  const { catcherUrl } = useRuntimeConfig(event)
  if (!catcherUrl || !isLoopback(event)) refuse(404, 'There is nothing here, or it is not yours to see.')
  return await caughtLetters(catcherUrl)
})
