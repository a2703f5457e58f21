import { ComeInBodySchema } from '#shared/schemas/entry'
import { comeIn } from '#server/services/come-in'

/** Coming in by e-mail and password. Open to anybody; tries are counted. */
export default defineEventHandler(async (event) => {
  const { email, password } = await readJson(event, ComeInBodySchema)
  await letIn(event, await comeIn(doorOf(event), email, password))
  return { in: true }
})
