import { ClassAndLessonParamsSchema } from '#shared/schemas/people'
import { takeOutLesson } from '#server/services/classes'

/** Takes a lesson out of a class. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-classes')
  const params = await readParams(event, ClassAndLessonParamsSchema)
  await takeOutLesson(useDatabase(), who, params.class, params.lesson)
  return { isTaught: false }
})
