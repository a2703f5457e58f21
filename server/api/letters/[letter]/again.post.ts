import { LetterParamsSchema } from '#shared/schemas/people'
import { sendAgain } from '#server/services/mail'

/** Tries a letter again that was given up. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  const { letter } = await readParams(event, LetterParamsSchema)
  await sendAgain(useDatabase(), who.studioId, letter, now(event))
  kickMail()
  return { again: true }
})
