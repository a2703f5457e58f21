import { givenUp } from '#server/services/mail'

/** Letters of the studio that could not be sent. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  return await givenUp(useDatabase(), who.studioId)
})
