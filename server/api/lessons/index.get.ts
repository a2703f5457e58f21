import { listLessons } from '#server/services/lessons'

/** Every lesson of the studio, for who may see lessons. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'see-lessons')
  return await listLessons(useDatabase(), who.studioId)
})
