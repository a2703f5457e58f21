import { LessonParamsSchema, RevisionQuerySchema } from '#shared/schemas/lessons'
import { lessonView } from '#server/services/revisions'

/** A lesson as the apprentice will meet it, and its revisions. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-lessons')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const { number } = await readQuery(event, RevisionQuerySchema)
  return await lessonView(useDatabase(), who.studioId, lesson, number)
})
