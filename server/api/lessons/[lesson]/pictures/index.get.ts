import { LessonParamsSchema } from '#shared/schemas/lessons'
import { lessonOf } from '#server/services/lessons'
import { picturesBeside } from '#server/services/pictures'

/** The pictures beside a lesson's text. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'write-lessons')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const { id } = await lessonOf(useDatabase(), who.studioId, lesson)
  return await picturesBeside(useDatabase(), who.studioId, id)
})
