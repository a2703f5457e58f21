import { meView } from '#server/services/me'

/** The person, their studios, the studio in hand and what they may do there. */
export default defineEventHandler(async (event) => {
  const who = await requirePerson(event)
  return await meView(useDatabase(), who)
})
