import { LessonParamsSchema, UseBodySchema } from '#shared/schemas/lessons'
import { putIntoUse } from '#server/services/into-use'

/** Puts the draft into use as a new revision. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'put-into-use')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const body = await readJson(event, UseBodySchema)
  const put = await putIntoUse(useDatabase(), who, lesson, body, now(event))
  setResponseStatus(event, put.same ? 200 : 201)
  return put
})
