import { LessonParamsSchema } from '#shared/schemas/lessons'
import { readDraft } from '#server/services/drafts'

/** The text in hand, for who writes lessons. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'write-lessons')
  const { lesson } = await readParams(event, LessonParamsSchema)
  return await readDraft(useDatabase(), who, lesson)
})
