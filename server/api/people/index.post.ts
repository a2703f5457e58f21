import { InviteBodySchema } from '#shared/schemas/people'
import { invite } from '#server/services/invitations'

/** Offers a place by mail, or takes in who has no e-mail. The id is made when the page opens. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  const body = await readJson(event, InviteBodySchema)
  const done = await invite(useDatabase(), who, body, now(event))
  kickMail()
  setResponseStatus(event, 201)
  return done
})
