import { LessonParamsSchema, MOST_PICTURE_BYTES, PictureQuerySchema } from '#shared/schemas/lessons'
import { tooLarge } from '#server/services/images'
import { lessonOf } from '#server/services/lessons'
import { addPicture } from '#server/services/pictures'
import { refuse } from '#server/services/refuse'

/** The bytes of a photograph, kept beside the text under the name that is asked for. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'write-lessons')
  const { lesson } = await readParams(event, LessonParamsSchema)
  const { name } = await readQuery(event, PictureQuerySchema)
  const { id } = await lessonOf(useDatabase(), who.studioId, lesson)
  const bytes = await readBytes(event, MOST_PICTURE_BYTES, tooLarge(MOST_PICTURE_BYTES, 'picture'))
  if (bytes.length === 0) refuse(400, 'There is no picture in this. Choose it again.')
  const picture = await addPicture(useDatabase(), useFiles(), who, id, name, bytes, now(event))
  setResponseStatus(event, 201)
  return picture
})
