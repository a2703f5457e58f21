import { NewLessonBodySchema } from '#shared/schemas/lessons'
import { makeLesson } from '#server/services/lessons'

/** A new lesson, with a text to begin from. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'write-lessons')
  const body = await readJson(event, NewLessonBodySchema)
  const lesson = await makeLesson(useDatabase(), who, body, now(event))
  setResponseStatus(event, 201)
  return lesson
})
