import { ClassParamsSchema } from '#shared/schemas/people'
import { classTable } from '#server/services/class-table'

/** The class progress table. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-classes')
  const params = await readParams(event, ClassParamsSchema)
  return await classTable(useDatabase(), who, params.class, now(event))
})
