import { FoundingBodySchema } from '#shared/schemas/judging'
import { founding } from '#server/services/names-under'

/** A level 5 where nobody holds one: the manager's, once, and shown as such for ever. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'found')
  const { password, ...given } = await readJson(event, FoundingBodySchema)
  await requirePassword(event, who, password)
  const signed = await founding(useDatabase(), who, given, now(event))
  setResponseStatus(event, signed.isNew ? 201 : 200)
  return { id: signed.row.id, level: signed.row.level }
})
