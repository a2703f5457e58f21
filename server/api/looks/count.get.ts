import { countLooks } from '#server/services/looks'

/** "Looks, 7 waiting." */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-pieces')
  return { waiting: await countLooks(useDatabase(), who.studioId, now(event)) }
})
