import { JudgementBodySchema } from '#shared/schemas/judging'
import { judgePiece } from '#server/services/judgements'

/** One look at one piece. The same id again is the same judgement. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'judge')
  const body = await readJson(event, JudgementBodySchema)
  const judged = await judgePiece(useDatabase(), who, who.sessionId, body, now(event))
  setResponseStatus(event, judged.isNew ? 201 : 200)
  kickMail()
  return judged
})
