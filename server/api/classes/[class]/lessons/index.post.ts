import { ClassLessonBodySchema, ClassParamsSchema } from '#shared/schemas/people'
import { addLesson } from '#server/services/classes'

/** Puts a lesson at the end of a class's lessons. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-classes')
  const params = await readParams(event, ClassParamsSchema)
  const body = await readJson(event, ClassLessonBodySchema)
  await addLesson(useDatabase(), who, params.class, body)
  setResponseStatus(event, 201)
  return { isTaught: true }
})
