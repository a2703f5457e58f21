import { ChangeClassBodySchema, ClassParamsSchema } from '#shared/schemas/people'
import { changeClass } from '#server/services/classes'

/** Changes a class's name, term or day. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-classes')
  const params = await readParams(event, ClassParamsSchema)
  const body = await readJson(event, ChangeClassBodySchema)
  return await changeClass(useDatabase(), who, params.class, body)
})
