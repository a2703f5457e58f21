import { PieceParamsSchema } from '#shared/schemas/pieces'
import { lookLine } from '#server/services/bench-room'

/** Where in the line the look asked for on a piece stands. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { piece } = await readParams(event, PieceParamsSchema)
  return await lookLine(useDatabase(), who, piece)
})
