import { PhotoParamsSchema } from '#shared/schemas/pieces'
import { MOST_BYTES } from '#server/services/images'
import { keepPhoto } from '#server/services/photos'
import { refuse } from '#server/services/refuse'

/** The bytes of a photo that one of the maker's events has told of. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'make-pieces')
  const { photo } = await readParams(event, PhotoParamsSchema)
  if (Number(getHeader(event, 'content-length') ?? 0) > MOST_BYTES) refuse(413, 'This photo is larger than 20 MB. Take it again with the camera of the tablet, or a smaller one.')
  const bytes = await readRawBody(event, false)
  if (!bytes || bytes.length === 0) refuse(400, 'There is no photo in this. Send it again.')
  return await keepPhoto(useDatabase(), useFiles(), who, photo, bytes)
})
