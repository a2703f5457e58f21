import { and, eq, inArray, isNull } from 'drizzle-orm'
import { dayIn, endOfDay } from '../../shared/bench/day'
import type { CardSheet } from '../../shared/types/entry'
import type { Db } from '../db/client'
import { memberships, studios } from '../db/schema/studio'
import { inTransaction } from '../db/transaction'
import type { Actor } from './actor'
import { countTry, giveBackTry } from './attempts'
import { classView } from './classes'
import { type Door, noteSecurity } from './come-in'
import { refuse } from './refuse'
import { openSession, type SessionKey } from './sessions'
import { cardHash, goodToken, makeCard } from './tokens'

/** A card may be printed some days ahead; longer, and it lies about for too long. */
const MOST_AHEAD_MS = 7 * 86_400_000

/**
 * Start cards for apprentices of a class: each a code, good until the end of the evening asked for. Nobody who is more
 * than an apprentice gets one, or a printed code would open what only a password should.
 */
export async function makeCards(db: Db, who: Actor, classId: string, { people, on }: { people: string[], on?: string }, now: Date): Promise<CardSheet> {
  const { people: inIt, name } = await classView(db, who, classId, now)
  const zone = await zoneOf(db, who.studioId)
  const day = on ?? dayIn(zone, now)
  const ends = endOfDay(zone, day)
  if (ends <= now || ends.getTime() - now.getTime() > MOST_AHEAD_MS) refuse(422, 'A start card is for today or one of the next days.', { fieldErrors: { on: ['Choose today or one of the next six days.'] } })
  const wanted = inIt.filter(person => people.includes(person.id))
  if (wanted.length < new Set(people).size) refuse(422, 'A start card is for people of this class.')
  const rows = await db.select({ id: memberships.personId, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, who.studioId), inArray(memberships.personId, people)))
  if (rows.some(row => row.roles.join() !== 'apprentice')) refuse(422, 'A start card is for apprentices. Others come in with their password.')
  const cards = await inTransaction(db, async (tx) => {
    const made = []
    for (const person of wanted) made.push({ personId: person.id, name: person.name, code: await makeCard(tx, { personId: person.id, studioId: who.studioId, ends }, now) })
    return made
  })
  await noteSecurity(db, who.personId, '', `cards-printed ${cards.length}`, now)
  return { className: name, on: day, ends: ends.toISOString(), cards }
}

async function zoneOf(db: Db, studioId: string): Promise<string> {
  const [row] = await db.select({ zone: studios.zone }).from(studios).where(eq(studios.id, studioId))
  return row?.zone ?? 'UTC'
}

/** Comes in by a start card, on any tablet, until the evening ends; the session keeps to the card's studio and ends with it. */
export async function comeInByCard({ db, address, agent, now }: Door, code: string): Promise<SessionKey> {
  await countTry(db, 'card', address, now)
  const token = await goodToken(db, cardHash(code), now)
  const [member] = token?.kind === 'card' && token.personId && token.studioId
    ? await db.select({ personId: memberships.personId, studioId: memberships.studioId, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, token.studioId), eq(memberships.personId, token.personId), isNull(memberships.leftAt)))
    : []
  if (!token || !member || member.roles.join() !== 'apprentice') {
    await noteSecurity(db, null, address, 'card-refused', now)
    refuse(401, 'This card is not known, or it is from another evening. Ask for a new one.')
  }
  await giveBackTry(db, 'card', address)
  await noteSecurity(db, member.personId, address, 'come-in-card', now)
  return await openSession(db, member.personId, agent, now, { studioId: member.studioId, ends: token.ends })
}
