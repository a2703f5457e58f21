import { SignOffParamsSchema } from '#shared/schemas/judging'
import { signOffView } from '#server/services/sign-off-view'

/** One sign-off with the pieces it rests on, the names under it, and what joined after it was signed. */
export default defineEventHandler(async (event) => {
  const who = await requireStudio(event)
  const { signOff } = await readParams(event, SignOffParamsSchema)
  return await signOffView(useDatabase(), who, signOff)
})
