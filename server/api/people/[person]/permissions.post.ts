import { PermissionBodySchema, PersonParamsSchema } from '#shared/schemas/judging'
import { actOnPermission } from '#server/services/permissions'

/** An act on a permission by an instructor: given, suspended at once, lifted, limited, withdrawn. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'suspend')
  const { person } = await readParams(event, PersonParamsSchema)
  const body = await readJson(event, PermissionBodySchema)
  const acted = await actOnPermission(useDatabase(), who, person, body, now(event))
  setResponseStatus(event, acted.isNew ? 201 : 200)
  return acted
})
