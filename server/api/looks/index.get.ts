import { listLooks } from '#server/services/looks'

/** What waits for an instructor: asked at the bench, in a bag, resting. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-pieces')
  return await listLooks(useDatabase(), who, now(event))
})
