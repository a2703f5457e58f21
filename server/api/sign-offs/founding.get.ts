import { foundingView } from '#server/services/founding-view'

/** Lessons in which nobody holds 5, and who could be given it. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'found')
  return await foundingView(useDatabase(), who, now(event))
})
