import { CardBodySchema } from '#shared/schemas/entry'
import { comeInByCard } from '#server/services/cards'

/** Coming in by a start card, this evening, without e-mail. Open to anybody; tries are counted. */
export default defineEventHandler(async (event) => {
  const { code } = await readJson(event, CardBodySchema)
  await letIn(event, await comeInByCard(doorOf(event), code))
  return { in: true }
})
