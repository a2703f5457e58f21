import { NewClassBodySchema } from '#shared/schemas/people'
import { makeClass } from '#server/services/classes'

/** Makes a class. The id is made when the page opens. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-classes')
  const body = await readJson(event, NewClassBodySchema)
  const made = await makeClass(useDatabase(), who, body)
  setResponseStatus(event, 201)
  return made
})
