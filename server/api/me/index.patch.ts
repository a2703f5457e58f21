import { MeBodySchema } from '#shared/schemas/entry'
import { changeMe } from '#server/services/me'

/** How the screens are to be for this person: hand, size of text, ground. */
export default defineEventHandler(async (event) => {
  const who = await requirePerson(event)
  const body = await readJson(event, MeBodySchema)
  return await changeMe(useDatabase(), who, body)
})
