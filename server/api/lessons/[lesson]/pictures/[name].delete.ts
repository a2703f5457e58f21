import { LessonPictureParamsSchema } from '#shared/schemas/lessons'
import { takeAwayPicture } from '#server/services/pictures'

/** Takes a picture from beside the text; revisions that show it keep it. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'write-lessons')
  const { lesson, name } = await readParams(event, LessonPictureParamsSchema)
  await takeAwayPicture(useDatabase(), who, lesson, name)
  return { taken: true }
})
