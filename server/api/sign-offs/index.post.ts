import { SignBodySchema } from '#shared/schemas/judging'
import { signAll } from '#server/services/sign-offs'

/** One password, and each of these is signed by itself; the answer says of each whether it was. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'sign')
  const { password, items } = await readJson(event, SignBodySchema)
  await requirePassword(event, who, password)
  const results = await signAll(useDatabase(), who, items, now(event))
  kickMail()
  return { results }
})
