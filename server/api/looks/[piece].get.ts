import { PieceParamsSchema } from '#shared/schemas/pieces'
import { lookView } from '#server/services/look-view'

/** All that the judging page shows of one piece. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-pieces')
  const { piece } = await readParams(event, PieceParamsSchema)
  return await lookView(useDatabase(), who, piece, now(event))
})
