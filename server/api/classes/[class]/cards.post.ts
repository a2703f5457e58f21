import { CardsBodySchema, ClassParamsSchema } from '#shared/schemas/people'
import { makeCards } from '#server/services/cards'

/** Start cards for apprentices of a class. The codes are in this answer only; a person's earlier card ends. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'give-cards')
  const params = await readParams(event, ClassParamsSchema)
  const body = await readJson(event, CardsBodySchema)
  const sheet = await makeCards(useDatabase(), who, params.class, body, now(event))
  setResponseStatus(event, 201)
  return sheet
})
