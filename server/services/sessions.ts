import { and, desc, eq, isNull } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { Role } from '../../shared/schemas/lists'
import type { Db, DbOrTx } from '../db/client'
import { people, personNames, sessions } from '../db/schema/people'
import { memberships, studios } from '../db/schema/studio'

/** A session ends after this long whatever is done, and after this long without anything done. */
export const ABSOLUTE_MS = 30 * 86_400_000
/** Longer than an evening, shorter than until the next: tablets are shared. */
export const IDLE_MS = 12 * 3_600_000
const TOUCH_MS = 60_000

/** What the sealed cookie holds; nothing about roles, which are read from the database at each request. */
export interface SessionKey { session: string, person: string, epoch: number }
export interface Seen { sessionId: string, personId: string, epoch: number, name: string, nameVersion: number, studioId: string | null, cardStudio: string | null }
/** A start card opens one studio, until it ends. */
export interface CardHeld { studioId: string, ends: Date }

/** Begins a session, with the person's first studio in hand. */
export async function openSession(db: DbOrTx, personId: string, agent: string, now: Date, card?: CardHeld): Promise<SessionKey> {
  const [person] = await db.select({ epoch: people.epoch }).from(people).where(eq(people.id, personId))
  const [first] = await studiosOf(db, personId, card?.studioId)
  const id = ulid(now.getTime())
  const ends = card?.ends ?? new Date(now.getTime() + ABSOLUTE_MS)
  await db.insert(sessions).values({ id, personId, studioId: first?.id ?? null, cardStudio: card?.studioId ?? null, created: now, lastSeen: now, ends, agent: agent.slice(0, 200) })
  return { session: id, person: personId, epoch: person?.epoch ?? 0 }
}

/** Who a cookie stands for now, or null when that session is over, was ended, or the person is gone. */
export async function seeSession(db: Db, key: SessionKey, now: Date): Promise<Seen | null> {
  const [row] = await db.select({ session: sessions, epoch: people.epoch, erasedAt: people.erasedAt }).from(sessions)
    .innerJoin(people, eq(people.id, sessions.personId)).where(and(eq(sessions.id, key.session), eq(sessions.personId, key.person)))
  if (!row || row.session.revokedAt || row.erasedAt || row.epoch !== key.epoch || row.session.ends <= now || now.getTime() - row.session.lastSeen.getTime() > IDLE_MS) return null
  if (now.getTime() - row.session.lastSeen.getTime() >= TOUCH_MS) await db.update(sessions).set({ lastSeen: now }).where(eq(sessions.id, key.session))
  const [named] = await db.select({ name: personNames.name, version: personNames.version }).from(personNames).where(eq(personNames.personId, key.person)).orderBy(desc(personNames.version)).limit(1)
  return { sessionId: key.session, personId: key.person, epoch: row.epoch, name: named?.name ?? '', nameVersion: named?.version ?? 0, studioId: row.session.studioId, cardStudio: row.session.cardStudio }
}

export async function endSession(db: Db, id: string, now: Date): Promise<void> {
  await db.update(sessions).set({ revokedAt: now }).where(and(eq(sessions.id, id), isNull(sessions.revokedAt)))
}

export interface StudioOf { id: string, slug: string, name: string, zone: string, roles: Role[] }

/** The studios a person is in now, with their roles there; `only` one of them where a card opened the session. */
export async function studiosOf(db: DbOrTx, personId: string, only?: string | null): Promise<StudioOf[]> {
  return await db.select({ id: studios.id, slug: studios.slug, name: studios.name, zone: studios.zone, roles: memberships.roles }).from(memberships)
    .innerJoin(studios, eq(studios.id, memberships.studioId))
    .where(and(eq(memberships.personId, personId), isNull(memberships.leftAt), only ? eq(memberships.studioId, only) : undefined)).orderBy(studios.name, studios.id)
}

/** Takes another of the person's studios in hand. False when it is none of theirs. */
export async function takeStudio(db: Db, who: Seen, studioId: string): Promise<boolean> {
  if (!(await studiosOf(db, who.personId, who.cardStudio)).some(studio => studio.id === studioId)) return false
  await db.update(sessions).set({ studioId }).where(eq(sessions.id, who.sessionId))
  return true
}
