import { InvitationParamsSchema } from '#shared/schemas/people'
import { withdrawInvitation } from '#server/services/invitations'

/** Takes an invitation back. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'manage-people')
  const { invitation } = await readParams(event, InvitationParamsSchema)
  await withdrawInvitation(useDatabase(), who, invitation, now(event))
  return { withdrawn: true }
})
