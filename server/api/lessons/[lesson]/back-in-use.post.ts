import { BackInUseBodySchema, LessonParamsSchema } from '#shared/schemas/lessons'
import { backInUse } from '#server/services/revisions'

/** Puts a withdrawn or an earlier revision back in use. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'put-into-use')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const body = await readJson(event, BackInUseBodySchema)
  await backInUse(useDatabase(), who, who.sessionId, lesson, body, now(event))
  return { inUse: true }
})
