import { LessonParamsSchema } from '#shared/schemas/lessons'
import { useView } from '#server/services/into-use'

/** What putting the draft into use would do. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'put-into-use')
  const { lesson } = await readParams(event, LessonParamsSchema)
  return await useView(useDatabase(), who.studioId, lesson)
})
