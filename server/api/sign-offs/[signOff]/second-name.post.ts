import { SecondNameBodySchema, SignOffParamsSchema } from '#shared/schemas/judging'
import { secondName } from '#server/services/names-under'

/** The second name under a level that stands on one signature. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'sign')
  const { signOff } = await readParams(event, SignOffParamsSchema)
  const { id, password } = await readJson(event, SecondNameBodySchema)
  await requirePassword(event, who, password)
  const signed = await secondName(useDatabase(), who, signOff, id, now(event))
  setResponseStatus(event, signed.isNew ? 201 : 200)
  kickMail()
  return { id: signed.row.id, level: signed.row.level }
})
