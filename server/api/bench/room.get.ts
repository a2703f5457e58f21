import { benchRoom } from '#server/services/bench-room'

/** What is at the benches, for who may look at a hold. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'witness')
  return await benchRoom(useDatabase(), who, now(event))
})
