import { RevisionPictureParamsSchema } from '#shared/schemas/lessons'
import { revisionPicture } from '#server/services/pictures'

/** A picture of a revision: for who may see lessons and for those the lesson is taught to. It never changes. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { revision, name } = await readParams(event, RevisionPictureParamsSchema)
  return sendPicture(event, await revisionPicture(useDatabase(), useFiles(), who, revision, name), true)
})
