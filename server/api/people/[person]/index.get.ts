import { PersonParamsSchema } from '#shared/schemas/people'
import { personView } from '#server/services/people'

/** One person of the studio, with their parts and classes. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  const { person } = await readParams(event, PersonParamsSchema)
  return await personView(useDatabase(), who.studioId, person)
})
