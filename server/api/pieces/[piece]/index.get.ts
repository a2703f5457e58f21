import { PieceParamsSchema } from '#shared/schemas/pieces'
import { pieceView } from '#server/services/piece-view'

/** A piece with its lesson and all its events: enough to go on with it on another tablet. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { piece } = await readParams(event, PieceParamsSchema)
  return await pieceView(useDatabase(), who, piece)
})
