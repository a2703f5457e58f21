import { listClasses } from '#server/services/classes'

/** The classes of the studio. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-classes')
  return await listClasses(useDatabase(), who.studioId)
})
