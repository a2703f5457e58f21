import { PersonParamsSchema, RoleBodySchema } from '#shared/schemas/people'
import { inTransaction } from '#server/db/transaction'
import { actOnRole } from '#server/services/people'

/** Gives or ends a part. The next request of the person already meets it. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  const { person } = await readParams(event, PersonParamsSchema)
  const body = await readJson(event, RoleBodySchema)
  return { roles: await inTransaction(useDatabase(), tx => actOnRole(tx, who, person, body, now(event))) }
})
