import { and, desc, eq, isNull } from 'drizzle-orm'
import { ulid } from 'ulid'
import { sha256 } from '../../shared/lesson/canonical'
import type { LinkAsks } from '../../shared/types/entry'
import type { Db, Tx } from '../db/client'
import { people, personNames } from '../db/schema/people'
import { studios } from '../db/schema/studio'
import { inTransaction, isDuplicate } from '../db/transaction'
import { countTry } from './attempts'
import { type Door, emailKey, noteSecurity, NOT_KNOWN, rightPassword } from './come-in'
import { takeOffer } from './invitations'
import { queueMail } from './mail'
import { refuse } from './refuse'
import { openSession, type SessionKey, type Seen } from './sessions'
import { goodToken, openToken, useToken } from './tokens'

const RESET_MS = 3_600_000
const EMAIL_MS = 2 * 86_400_000
const GONE = 'This link is used up or too old. Ask for another one.'
const TAKEN = 'This e-mail belongs to somebody already. Come in with it and its own password.'

type Token = NonNullable<Awaited<ReturnType<typeof goodToken>>>

async function linkToken(db: Db | Tx, secret: string, now: Date): Promise<Token> {
  const token = await goodToken(db, sha256(secret), now)
  if (!token || token.kind === 'card') refuse(404, GONE)
  return token
}

/** The account behind a link: its own, or for an invitation the one of the same e-mail that has a password already. */
async function accountOf(db: Db | Tx, token: Token) {
  const whose = token.personId ? eq(people.id, token.personId) : eq(people.emailKey, token.emailKey ?? '')
  const [row] = await db.select({ id: people.id, hash: people.passwordHash, epoch: people.epoch }).from(people).where(and(whose, isNull(people.erasedAt)))
  return row ?? null
}

/** What a mailed link is for, and what it asks. Only who holds the letter learns it. */
export async function linkAsks(db: Db, secret: string, now: Date): Promise<LinkAsks> {
  const token = await linkToken(db, secret, now)
  const account = await accountOf(db, token)
  const [studio] = token.studioId ? await db.select({ name: studios.name }).from(studios).where(eq(studios.id, token.studioId)) : []
  const [named] = account ? await db.select({ name: personNames.name }).from(personNames).where(eq(personNames.personId, account.id)).orderBy(desc(personNames.version)).limit(1) : []
  return { kind: token.kind === 'invite' ? 'invitation' : token.kind === 'reset' ? 'reset' : 'email', name: named?.name ?? token.offer?.name ?? '', studio: studio?.name ?? null, isKnown: token.kind === 'invite' && !!account?.hash }
}

/** Answers a mailed link: comes in with a new password, or for an invitation of a known person with the one they have. Works once. */
export async function answerLink(door: Door, secret: string, body: { name?: string, password: string }): Promise<SessionKey> {
  const { db, passwords, address, agent, now } = door
  await countTry(db, 'address', address, now)
  const first = await linkToken(db, secret, now)
  const known = await accountOf(db, first)
  const keeps = first.kind === 'invite' && known?.hash
  if (keeps && !await rightPassword(door, first.emailKey ?? '', known.hash, body.password)) refuse(401, NOT_KNOWN)
  const hash = keeps ? null : await passwords.make(body.password)
  const key = await inTransaction(db, async (tx) => {
    const token = await linkToken(tx, secret, now)
    if (!await useToken(tx, token.id, now)) refuse(404, GONE)
    const personId = await personBy(tx, token, body.name, hash, now)
    if (token.kind === 'invite' && !await takeOffer(tx, token, personId, now)) refuse(404, GONE)
    return await openSession(tx, personId, agent, now)
  })
  await noteSecurity(db, key.person, address, hash ? 'password-set' : 'invitation-taken', now)
  return key
}

/** The person the link lets in; made where an invitation meets nobody. A new password ends every other session. */
async function personBy(tx: Tx, token: Token, name: string | undefined, hash: string | null, now: Date): Promise<string> {
  const account = await accountOf(tx, token)
  const id = account?.id ?? ulid(now.getTime())
  if (!account) {
    if (token.kind !== 'invite' || !hash) refuse(404, GONE)
    await tx.insert(people).values({ id, email: token.emailKey, emailKey: token.emailKey, passwordHash: hash, wants: {} })
    await tx.insert(personNames).values({ personId: id, version: 1, name: name ?? token.offer?.name ?? '', fromAt: now })
    return id
  }
  if (token.kind === 'email') await setEmail(tx, id, token.emailKey)
  if (hash) await tx.update(people).set({ passwordHash: hash, epoch: account.epoch + 1 }).where(eq(people.id, id))
  return id
}

async function setEmail(tx: Tx, id: string, key: string | null): Promise<void> {
  try {
    await tx.update(people).set({ email: key, emailKey: key }).where(eq(people.id, id))
  }
  catch (error) {
    if (isDuplicate(error)) refuse(409, TAKEN)
    throw error
  }
}

/** Sends a link for a new password, if the address is known. The answer is the same either way. */
export async function forgotten({ db, address, now }: Door, email: string): Promise<void> {
  const key = emailKey(email)
  await countTry(db, 'address', address, now)
  await countTry(db, 'letter', key, now)
  await inTransaction(db, async (tx) => {
    const [person] = await tx.select({ id: people.id }).from(people).where(and(eq(people.emailKey, key), isNull(people.erasedAt)))
    if (!person) return
    const id = ulid(now.getTime())
    await openToken(tx, id, { kind: 'reset', personId: person.id, emailKey: key, studioId: null, ends: new Date(now.getTime() + RESET_MS) })
    await queueMail(tx, { studioId: null, toPerson: person.id, kind: 'reset', body: { token: id }, dedupeKey: `reset ${id}` }, now)
  })
}

/** An e-mail of their own for a person who has none: it is theirs once the letter to it is answered. */
export async function askEmail(db: Db, who: Seen, studioId: string | null, email: string, now: Date): Promise<void> {
  await countTry(db, 'letter', who.personId, now)
  await inTransaction(db, async (tx) => {
    const [person] = await tx.select({ email: people.email }).from(people).where(eq(people.id, who.personId)).for('update')
    if (person?.email) refuse(409, 'You have an e-mail here already.')
    const id = ulid(now.getTime())
    await openToken(tx, id, { kind: 'email', personId: who.personId, emailKey: emailKey(email), studioId, ends: new Date(now.getTime() + EMAIL_MS) })
    await queueMail(tx, { studioId, toAddress: email, kind: 'email-change', body: { token: id }, dedupeKey: `email ${id}` }, now)
  })
}
