import { and, asc, eq, isNull } from 'drizzle-orm'
import { may } from '../../shared/judging/roles'
import type { Db } from '../db/client'
import { people } from '../db/schema/people'
import { memberships, studios } from '../db/schema/studio'
import type { Actor } from './actor'
import { refuse } from './refuse'

/** In whose name lessons are taken in: the person of that e-mail, else the studio's longest-standing instructor. */
export async function authorOf(db: Db, studioSlug: string, email?: string): Promise<Actor> {
  const [studio] = await db.select({ id: studios.id }).from(studios).where(eq(studios.slug, studioSlug))
  if (!studio) refuse(404, `There is no studio ${studioSlug}.`)
  const rows = await db.select({ personId: memberships.personId, roles: memberships.roles, emailKey: people.emailKey }).from(memberships)
    .innerJoin(people, eq(people.id, memberships.personId)).where(and(eq(memberships.studioId, studio.id), isNull(memberships.leftAt))).orderBy(asc(memberships.joined), asc(memberships.id))
  const writers = rows.filter(row => may(row.roles, 'write-lessons') && may(row.roles, 'put-into-use'))
  const key = email?.trim().toLowerCase()
  const [writer] = key === undefined ? writers : writers.filter(row => row.emailKey === key)
  if (!writer) refuse(403, key === undefined ? `${studioSlug} has no instructor yet.` : `${email} is no instructor of ${studioSlug}.`)
  return { studioId: studio.id, personId: writer.personId, roles: writer.roles }
}
