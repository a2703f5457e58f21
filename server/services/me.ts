import { eq } from 'drizzle-orm'
import { ACTS, may } from '../../shared/judging/roles'
import type { Me } from '../../shared/types/entry'
import type { DbOrTx } from '../db/client'
import { people } from '../db/schema/people'
import { found } from './refuse'
import { studiosOf, type Who } from './sessions'

/** What the screens need to know of who is here. Says nothing of anybody else. */
export async function meView(db: DbOrTx, who: Who): Promise<Me> {
  const [row] = await db.select({ hand: people.hand, textSize: people.textSize, ground: people.ground }).from(people).where(eq(people.id, who.personId))
  const held = await studiosOf(db, who.personId)
  const inHand = held.find(one => one.id === who.studioId)
  const roles = inHand?.roles ?? []
  return {
    person: { id: who.personId, name: who.name, ...found(row) },
    studios: held.map(({ id, slug, name, roles }) => ({ id, slug, name, roles })),
    studio: inHand ? { id: inHand.id, slug: inHand.slug, name: inHand.name, zone: inHand.zone } : null,
    roles,
    may: ACTS.filter(act => may(roles, act)),
  }
}
