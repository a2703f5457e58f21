import { LessonParamsSchema, PutAwayBodySchema } from '#shared/schemas/lessons'
import { putAway } from '#server/services/lessons'

/** Puts a lesson away, or takes it out again. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'put-into-use')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const { away } = await readJson(event, PutAwayBodySchema)
  return await putAway(useDatabase(), who, lesson, away, now(event))
})
