import { desc, eq } from 'drizzle-orm'
import { sha256 } from '../../shared/lesson/canonical'
import type { Db } from '../db/client'
import { people, personNames } from '../db/schema/people'
import { inTransaction } from '../db/transaction'
import { countTry } from './attempts'
import { type Door, emailKey, noteSecurity } from './come-in'
import { queueMail } from './mail'
import { refuse } from './refuse'
import { openSession, type SessionKey } from './sessions'
import { cardHash, goodToken, makeToken, useToken } from './tokens'

const RESET_MS = 3600_000
const GONE = 'This link is used up or too old. Ask for another one.'

/** What a mailed link is for: whose, and whether a name is asked. */
export async function tokenFor(db: Db, secret: string, now: Date) {
  const token = await goodToken(db, sha256(secret), now)
  if (!token?.personId || (token.kind !== 'invite' && token.kind !== 'reset')) refuse(404, GONE)
  const [named] = await db.select({ name: personNames.name }).from(personNames).where(eq(personNames.personId, token.personId)).orderBy(desc(personNames.version)).limit(1)
  return { kind: token.kind, name: named?.name ?? '' }
}

/** Sets the password by a mailed link and comes in. Every other session of the person ends. */
export async function useMailedToken(door: Door, secret: string, body: { name?: string, password: string }): Promise<SessionKey> {
  const { db, passwords, address, agent, now } = door
  await countTry(db, 'address', address, now)
  const hash = await passwords.make(body.password)
  const key = await inTransaction(db, async (tx) => {
    const token = await goodToken(tx, sha256(secret), now)
    if (!token?.personId || (token.kind !== 'invite' && token.kind !== 'reset') || !await useToken(tx, token.id, now)) refuse(404, GONE)
    const [person] = await tx.select({ epoch: people.epoch }).from(people).where(eq(people.id, token.personId)).for('update')
    await tx.update(people).set({ passwordHash: hash, epoch: (person?.epoch ?? 0) + 1 }).where(eq(people.id, token.personId))
    const [named] = await tx.select({ name: personNames.name, version: personNames.version }).from(personNames).where(eq(personNames.personId, token.personId)).orderBy(desc(personNames.version)).limit(1)
    if (body.name && body.name !== named?.name) await tx.insert(personNames).values({ personId: token.personId, version: (named?.version ?? 0) + 1, name: body.name, fromAt: now })
    return await openSession(tx, token.personId, agent, now)
  })
  await noteSecurity(db, key.person, address, 'password-set', now)
  return key
}

/** Sends a link for a new password, if the address is known. The answer is the same either way. */
export async function forgotten(door: Door, email: string): Promise<void> {
  const { db, address, now } = door
  await countTry(db, 'address', address, now)
  const key = emailKey(email)
  await countTry(db, 'account', `reset ${key}`, now)
  await inTransaction(db, async (tx) => {
    const [person] = await tx.select({ id: people.id, erasedAt: people.erasedAt }).from(people).where(eq(people.emailKey, key))
    if (!person || person.erasedAt) return
    const token = await makeToken(tx, { kind: 'reset', personId: person.id, emailKey: key, studioId: null, ends: new Date(now.getTime() + RESET_MS) }, now)
    await queueMail(tx, { studioId: null, toPerson: person.id, kind: 'reset', body: { token }, dedupeKey: `reset ${sha256(token).slice(0, 40)}` }, now)
  })
}

/** Comes in by a start card: once, this evening, without e-mail. The session ends with the card. */
export async function comeInByCard(door: Door, code: string): Promise<SessionKey> {
  const { db, address, agent, now } = door
  await countTry(db, 'card', address, now)
  const key = await inTransaction(db, async (tx) => {
    const token = await goodToken(tx, cardHash(code), now)
    if (!token?.personId || token.kind !== 'card' || !await useToken(tx, token.id, now)) refuse(401, 'This card is not known, or it was used or is from another evening. Ask for a new one.')
    return await openSession(tx, token.personId, agent, now, token.ends)
  })
  await noteSecurity(db, key.person, address, 'come-in-card', now)
  return key
}
