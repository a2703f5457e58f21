import { EmailBodySchema } from '#shared/schemas/entry'
import { askEmail } from '#server/services/by-token'

/** An e-mail of one's own, for who came in by a card and has none. It counts once the letter to it is answered. */
export default defineEventHandler(async (event) => {
  const who = await requirePerson(event)
  const { email } = await readJson(event, EmailBodySchema)
  await askEmail(useDatabase(), who, who.cardStudio ?? who.studioId, email, now(event))
  kickMail()
  setResponseStatus(event, 202)
  return { asked: true }
})
