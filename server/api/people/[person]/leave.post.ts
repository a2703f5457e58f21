import { PersonParamsSchema } from '#shared/schemas/people'
import { leave } from '#server/services/people'

/** A person leaves the studio. Their record stays. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  const { person } = await readParams(event, PersonParamsSchema)
  await leave(useDatabase(), who, person, now(event))
  return { left: true }
})
