import { LookBodySchema, PieceParamsSchema } from '#shared/schemas/pieces'
import { giveLook } from '#server/services/bench-acts'

/** An instructor has given the look that was asked for, with a word or without. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'witness')
  const { piece } = await readParams(event, PieceParamsSchema)
  const body = await readJson(event, LookBodySchema)
  await giveLook(useDatabase(), who, who.sessionId, piece, body, now(event))
  return { given: true }
})
