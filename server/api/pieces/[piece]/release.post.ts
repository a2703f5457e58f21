import { PieceParamsSchema, ReleaseBodySchema } from '#shared/schemas/pieces'
import { releaseHold } from '#server/services/bench-acts'

/** An instructor lets a wrong question go, with a reason; kept as released, never as answered. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'witness')
  const { piece } = await readParams(event, PieceParamsSchema)
  const body = await readJson(event, ReleaseBodySchema)
  await releaseHold(useDatabase(), who, who.sessionId, piece, body, now(event))
  kickMail()
  return { released: true }
})
