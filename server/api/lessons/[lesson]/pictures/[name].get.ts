import { LessonPictureParamsSchema } from '#shared/schemas/lessons'
import { draftPicture } from '#server/services/pictures'

/** A picture beside the text, for who writes; another may take its name. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-lessons')
  const { lesson, name } = await readParams(event, LessonPictureParamsSchema)
  return sendPicture(event, await draftPicture(useDatabase(), useFiles(), who.studioId, lesson, name), false)
})
