import { BatchSchema } from '#shared/bench/events'
import { PieceParamsSchema } from '#shared/schemas/pieces'
import { takeIn } from '#server/services/pieces'

/** The maker's own events, from a tablet. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'make-pieces')
  const { piece } = await readParams(event, PieceParamsSchema)
  const batch = await readJson(event, BatchSchema)
  const { status, ...taken } = await takeIn(useDatabase(), who, piece, batch, now(event))
  setResponseStatus(event, status)
  return taken
})
