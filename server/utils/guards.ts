import type { H3Event } from 'h3'
import { type Act, may } from '#shared/judging/roles'
import type { Role } from '#shared/schemas/lists'
import { refuse } from '#server/services/refuse'
import { type Seen, seeSession, type SessionKey, type StudioOf, studiosOf } from '#server/services/sessions'

export type Who = Seen
export interface StudioWho extends Who { studioId: string, studio: Omit<StudioOf, 'roles'>, roles: Role[], studios: StudioOf[] }

const WHO_ARE_YOU = 'Say who you are, then this goes on.'

/** Proves a session that is still good. Guards everything but coming in. */
export async function requirePerson(event: H3Event): Promise<Who> {
  const key = await sessionKey(event)
  const seen = key ? await seeSession(useDatabase(), key, now(event)) : null
  return seen ?? refuse(401, WHO_ARE_YOU)
}

/** What the sealed cookie says, or null. Does not make a session where there is none. */
export async function sessionKey(event: H3Event): Promise<SessionKey | null> {
  if (!getCookie(event, useRuntimeConfig(event).session.name ?? '')) return null
  const { secure } = await getUserSession(event)
  return secure ?? null
}

/** Proves that the person is in the studio they have in hand, with the roles they hold at this moment. */
export async function requireStudio(event: H3Event): Promise<StudioWho> {
  const who = await requirePerson(event)
  const studios = await studiosOf(useDatabase(), who.personId, who.cardStudio)
  const studio = studios.find(one => one.id === who.studioId) ?? studios[0]
  if (!studio) refuse(403, 'You are in no studio at present. Ask your studio to invite you.')
  const { roles, ...about } = studio
  return { ...who, studioId: studio.id, studio: about, roles, studios }
}

/** Proves that one of their roles may do this act. Guards each route that does or shows something of a studio. */
export async function requireMay(event: H3Event, act: Act): Promise<StudioWho> {
  const who = await requireStudio(event)
  if (!may(who.roles, act)) refuse(403, 'This is not one of the things you may do in this studio. Ask the manager if it should be.')
  return who
}
