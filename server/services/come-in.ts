import { and, eq, isNull } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { Db } from '../db/client'
import { people, securityLog } from '../db/schema/people'
import { countTry, forgetTries, giveBackTry } from './attempts'
import type { Passwords } from './passwords'
import { refuse } from './refuse'
import { openSession, type SessionKey } from './sessions'

export interface Door { db: Db, passwords: Passwords, address: string, agent: string, now: Date }

/** Said for an unknown e-mail and for a wrong password alike. */
export const NOT_KNOWN = 'That e-mail and password do not go together. Try again, or ask for a new password.'

/** E-mail as it is compared: trimmed, small letters. */
export const emailKey = (email: string): string => email.trim().toLowerCase()

export async function passwordHashOf(db: Db, personId: string): Promise<string | null> {
  const [row] = await db.select({ hash: people.passwordHash }).from(people).where(eq(people.id, personId))
  return row?.hash ?? null
}

/** Comes in by e-mail and password. The same work is done and the same is said whether or not the e-mail is known. */
export async function comeIn(door: Door, email: string, password: string): Promise<SessionKey> {
  const { db, address, agent, now } = door
  const key = emailKey(email)
  const [person] = await db.select({ id: people.id, hash: people.passwordHash }).from(people).where(and(eq(people.emailKey, key), isNull(people.erasedAt)))
  if (!await rightPassword(door, key, person?.hash ?? null, password) || !person) {
    await noteSecurity(db, person?.id ?? null, address, 'come-in-refused', now)
    refuse(401, NOT_KNOWN)
  }
  await noteSecurity(db, person.id, address, 'come-in', now)
  return await openSession(db, person.id, agent, now)
}

/** Counts the try, does the work, and forgets the count where it was right; hashes again where the numbers have changed. */
export async function rightPassword({ db, passwords, address, now }: Door, key: string, hash: string | null, password: string): Promise<boolean> {
  await countTry(db, 'address', address, now)
  await countTry(db, 'anywhere', key, now)
  await countTry(db, 'account', `${key} ${address}`, now)
  if (!await passwords.check(hash, password)) return false
  await giveBackTry(db, 'address', address)
  await forgetTries(db, 'anywhere', key)
  await forgetTries(db, 'account', `${key} ${address}`)
  if (hash && passwords.isOld(hash)) await db.update(people).set({ passwordHash: await passwords.make(password) }).where(and(eq(people.emailKey, key), eq(people.passwordHash, hash)))
  return true
}

/** A line for whoever looks after the studio: who, from where, what. Holds no secret. */
export async function noteSecurity(db: Db, person: string | null, address: string, what: string, now: Date): Promise<void> {
  await db.insert(securityLog).values({ id: ulid(now.getTime()), at: now, person, address: address.slice(0, 64), what })
}
