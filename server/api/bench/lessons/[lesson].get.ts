import { BenchLessonParamsSchema } from '#shared/schemas/bench'
import { benchLesson } from '#server/services/bench-lesson'

/** A lesson in use, with what the bench needs to begin a piece of it. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'make-pieces')
  const { lesson } = await readParams(event, BenchLessonParamsSchema)
  return await benchLesson(useDatabase(), who, lesson, now(event))
})
