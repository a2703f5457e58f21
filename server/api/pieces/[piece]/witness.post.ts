import { PieceParamsSchema, WitnessBodySchema } from '#shared/schemas/pieces'
import { inTransaction } from '#server/db/transaction'
import { actOnPiece } from '#server/services/piece-acts'

/** An instructor has looked at a hold. It judges nothing and signs nothing. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'witness')
  const { piece } = await readParams(event, PieceParamsSchema)
  const { id, turn, how } = await readJson(event, WitnessBodySchema)
  await inTransaction(useDatabase(), tx => actOnPiece(tx, who, { pieceId: piece, tablet: who.sessionId, id, kind: 'hold.witnessed', body: { turn, how } }, now(event)))
  return { witnessed: true }
})
