import { ClassAndPersonParamsSchema } from '#shared/schemas/people'
import { inTransaction } from '#server/db/transaction'
import { takeOutOfClass } from '#server/services/class-people'

/** Takes a person out of a class. What they made and hold stays. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-classes')
  const params = await readParams(event, ClassAndPersonParamsSchema)
  await inTransaction(useDatabase(), tx => takeOutOfClass(tx, who, params.class, params.person, now(event)))
  return { isIn: false }
})
