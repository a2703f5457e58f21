import { DraftBodySchema, LessonParamsSchema } from '#shared/schemas/lessons'
import { saveDraft } from '#server/services/drafts'

/** Keeps the text, finished or not. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'write-lessons')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const body = await readJson(event, DraftBodySchema)
  return await saveDraft(useDatabase(), who, lesson, body, now(event))
})
