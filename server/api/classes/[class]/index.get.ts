import { ClassParamsSchema } from '#shared/schemas/people'
import { classView } from '#server/services/classes'

/** A class with the people in it today and its lessons in order. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-classes')
  const params = await readParams(event, ClassParamsSchema)
  return await classView(useDatabase(), who, params.class, now(event))
})
