import { LinkBodySchema } from '#shared/schemas/entry'
import { linkAsks } from '#server/services/by-token'
import { countTry } from '#server/services/attempts'

/** What a mailed link is for. Its secret travels in the body, so that it stands in no list of addresses asked for. */
export default defineEventHandler(async (event) => {
  const { token } = await readJson(event, LinkBodySchema)
  const { db, address, now: at } = doorOf(event)
  await countTry(db, 'address', address, at)
  return await linkAsks(db, token, at)
})
