import { StudioBodySchema } from '#shared/schemas/entry'
import { meView } from '#server/services/me'
import { found } from '#server/services/refuse'
import { takeStudio } from '#server/services/sessions'

/** Takes another of one's own studios in hand. */
export default defineEventHandler(async (event) => {
  const who = await requirePerson(event)
  const { studioId } = await readJson(event, StudioBodySchema)
  found(await takeStudio(useDatabase(), who, studioId) || null)
  return await meView(useDatabase(), { ...who, studioId })
})
