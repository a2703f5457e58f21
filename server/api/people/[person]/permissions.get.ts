import { PersonParamsSchema } from '#shared/schemas/judging'
import { permissionsView } from '#server/services/permissions'

/** What a person may do at heat, motors, acid and mill today, and on whose word. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-pieces')
  const { person } = await readParams(event, PersonParamsSchema)
  return await permissionsView(useDatabase(), who, person)
})
