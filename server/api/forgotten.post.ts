import { EmailBodySchema } from '#shared/schemas/entry'
import { forgotten } from '#server/services/by-token'

/** Asks for a letter with a link to a new password. The answer never says whether the e-mail is known. */
export default defineEventHandler(async (event) => {
  const { email } = await readJson(event, EmailBodySchema)
  await forgotten(doorOf(event), email)
  kickMail()
  setResponseStatus(event, 202)
  return { asked: true }
})
