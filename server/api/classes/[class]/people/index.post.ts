import { ClassParamsSchema, ClassPersonBodySchema } from '#shared/schemas/people'
import { inTransaction } from '#server/db/transaction'
import { putInClass } from '#server/services/class-people'

/** Puts a person of the studio into a class, from today on. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-classes')
  const params = await readParams(event, ClassParamsSchema)
  const { personId } = await readJson(event, ClassPersonBodySchema)
  await inTransaction(useDatabase(), tx => putInClass(tx, who, params.class, personId, now(event)))
  setResponseStatus(event, 201)
  return { isIn: true }
})
