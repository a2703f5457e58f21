import { AnswerBodySchema, LinkBodySchema, NewAnswerBodySchema } from '#shared/schemas/entry'
import { answerLink, linkAsks } from '#server/services/by-token'

/** Answers a mailed link (invitation, new password, own e-mail) and comes in. Works once. */
export default defineEventHandler(async (event) => {
  const { token } = await readJson(event, LinkBodySchema.loose())
  const { isKnown } = await linkAsks(useDatabase(), token, now(event))
  const { token: secret, ...body } = await readJson(event, isKnown ? AnswerBodySchema : NewAnswerBodySchema)
  await letIn(event, await answerLink(doorOf(event), secret, body))
  return { in: true }
})
