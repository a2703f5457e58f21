import { eq } from 'drizzle-orm'
import type { z } from 'zod'
import { ACTS, may } from '../../shared/judging/roles'
import type { MeBodySchema } from '../../shared/schemas/entry'
import type { Me } from '../../shared/types/entry'
import type { DbOrTx } from '../db/client'
import { people } from '../db/schema/people'
import { found } from './refuse'
import { type Seen, studiosOf } from './sessions'

/** What the screens need to know of who is here. Says nothing of anybody else. */
export async function meView(db: DbOrTx, who: Seen): Promise<Me> {
  const [row] = await db.select({ hand: people.hand, textSize: people.textSize, ground: people.ground, email: people.email }).from(people).where(eq(people.id, who.personId))
  const { email, hand, textSize, ground } = found(row)
  const held = await studiosOf(db, who.personId, who.cardStudio)
  const inHand = held.find(one => one.id === who.studioId) ?? held[0]
  const roles = inHand?.roles ?? []
  return {
    person: { id: who.personId, name: who.name, hand, textSize, ground },
    byCard: who.cardStudio !== null,
    hasEmail: email !== null,
    studios: held.map(({ id, slug, name, roles }) => ({ id, slug, name, roles })),
    studio: inHand ? { id: inHand.id, slug: inHand.slug, name: inHand.name, zone: inHand.zone } : null,
    roles,
    may: ACTS.filter(act => may(roles, act)),
  }
}

/** Changes how the screens are for this person. */
export async function changeMe(db: DbOrTx, who: Seen, body: z.infer<typeof MeBodySchema>): Promise<Me> {
  if (Object.keys(body).length > 0) await db.update(people).set(body).where(eq(people.id, who.personId))
  return await meView(db, who)
}
