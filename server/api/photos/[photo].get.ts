import { PhotoParamsSchema } from '#shared/schemas/pieces'
import { readPhoto } from '#server/services/photos'

/** A photo of a piece, for its maker and for who may see pieces. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { photo } = await readParams(event, PhotoParamsSchema)
  const bytes = await readPhoto(useDatabase(), useFiles(), who, photo)
  setResponseHeaders(event, { 'content-type': 'image/jpeg', 'x-content-type-options': 'nosniff', 'content-disposition': 'inline', 'cache-control': 'private, max-age=31536000, immutable', 'content-security-policy': "default-src 'none'; sandbox" })
  return bytes
})
