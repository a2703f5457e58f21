import { LessonParamsSchema, WithdrawBodySchema } from '#shared/schemas/lessons'
import { withdraw } from '#server/services/revisions'

/** Takes a revision out of use; for danger, its pieces are stopped. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'put-into-use')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const body = await readJson(event, WithdrawBodySchema)
  await withdraw(useDatabase(), who, who.sessionId, lesson, body, now(event))
  return { withdrawn: true }
})
