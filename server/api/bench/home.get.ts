import { benchHome } from '#server/services/bench-home'

/** A person's own bench. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'make-pieces')
  return await benchHome(useDatabase(), who, now(event))
})
