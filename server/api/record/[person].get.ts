import { PersonParamsSchema } from '#shared/schemas/people'
import { personRecord } from '#server/services/record'

/** A person's record: their own, or for who may see pieces or records of the studio. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { person } = await readParams(event, PersonParamsSchema)
  return await personRecord(useDatabase(), who, person, now(event))
})
