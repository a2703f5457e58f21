import { listPeople } from '#server/services/people'

/** Everyone of the studio, and the invitations that wait. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  return await listPeople(useDatabase(), who.studioId, now(event))
})
