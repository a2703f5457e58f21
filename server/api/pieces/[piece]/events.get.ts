import { EventsQuerySchema, PieceParamsSchema } from '#shared/schemas/pieces'
import { eventsAfter } from '#server/services/piece-view'

/** Events of a piece after a number, for its maker and for who may see pieces. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { piece } = await readParams(event, PieceParamsSchema)
  const { after } = await readQuery(event, EventsQuerySchema)
  return await eventsAfter(useDatabase(), who, piece, after)
})
