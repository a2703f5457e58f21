import { and, eq, isNull } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { z } from 'zod'
import { may } from '../../shared/judging/roles'
import type { InviteBodySchema } from '../../shared/schemas/people'
import type { Db, Tx } from '../db/client'
import { people, personNames, tokens } from '../db/schema/people'
import { classes, memberships } from '../db/schema/studio'
import { inTransaction, isDuplicate } from '../db/transaction'
import type { Actor } from './actor'
import { emailKey } from './come-in'
import { queueMail } from './mail'
import { putInClass } from './class-people'
import { actOnRole, join } from './people'
import { found, refuse } from './refuse'
import type { goodToken } from './tokens'
import { openToken } from './tokens'

export const INVITATION_MS = 14 * 86_400_000

type Invite = z.infer<typeof InviteBodySchema>
type Token = NonNullable<Awaited<ReturnType<typeof goodToken>>>

/**
 * Offers a person a place. With an e-mail nothing is so until the letter is answered, so that a studio learns nothing of
 * who is known elsewhere and nobody is put into one unasked. Without, they are in it at once and come in by a start card.
 */
export async function invite(db: Db, who: Actor, body: Invite, now: Date): Promise<{ id: string, is: 'invited' | 'joined' }> {
  return await inTransaction(db, async (tx) => {
    if (body.classId) await findClass(tx, who, body.classId)
    if (body.email) await offer(tx, who, body, body.email, now)
    else await takeIn(tx, who, body, now)
    return { id: body.id, is: body.email ? 'invited' : 'joined' } as const
  })
}

async function findClass(tx: Tx, who: Actor, classId: string): Promise<void> {
  const [row] = await tx.select({ id: classes.id }).from(classes).where(and(eq(classes.studioId, who.studioId), eq(classes.id, classId)))
  found(row)
}

async function offer(tx: Tx, who: Actor, body: Invite, email: string, now: Date): Promise<void> {
  const key = emailKey(email)
  const [there] = await tx.select({ id: memberships.id }).from(memberships).innerJoin(people, eq(people.id, memberships.personId))
    .where(and(eq(memberships.studioId, who.studioId), isNull(memberships.leftAt), eq(people.emailKey, key)))
  if (there) refuse(409, 'This person is in the studio already.', { fieldErrors: { email: ['This person is in the studio already.'] } })
  const { name, roles, ageBand, classId } = body
  const isNew = await openToken(tx, body.id, { kind: 'invite', personId: null, emailKey: key, studioId: who.studioId, ends: new Date(now.getTime() + INVITATION_MS), offer: { name, roles, ageBand, classId: classId ?? null, by: who.personId } })
  if (isNew) await queueMail(tx, { studioId: who.studioId, toAddress: email, kind: 'invitation', body: { token: body.id, by: who.personId }, dedupeKey: `invitation ${body.id}` }, now)
}

async function takeIn(tx: Tx, who: Actor, body: Invite, now: Date): Promise<void> {
  try {
    await tx.insert(people).values({ id: body.id, wants: {} })
  }
  catch (error) {
    if (!isDuplicate(error)) throw error
    // The same press again; or the id of another studio's person, who is not there.
    const [member] = await tx.select({ id: memberships.id }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, body.id)))
    found(member)
    return
  }
  await tx.insert(personNames).values({ personId: body.id, version: 1, name: body.name, fromAt: now })
  await giveParts(tx, who, body.id, { ...body, classId: body.classId ?? null }, now)
}

async function giveParts(tx: Tx, who: Actor, personId: string, given: Pick<Invite, 'roles' | 'ageBand'> & { classId: string | null }, now: Date): Promise<void> {
  await join(tx, who, personId, given.ageBand, now)
  for (const role of given.roles) await actOnRole(tx, who, personId, { id: ulid(now.getTime()), role, act: 'given' }, now)
  if (given.classId) await putInClass(tx, who, given.classId, personId, now)
}

/** Takes the place that is offered. False where who offered it may not do so any more. */
export async function takeOffer(tx: Tx, { studioId, offer }: Token, personId: string, now: Date): Promise<boolean> {
  if (!studioId || !offer) return false
  const [by] = await tx.select({ roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, studioId), eq(memberships.personId, offer.by), isNull(memberships.leftAt)))
  if (!by || !may(by.roles, 'manage-people')) return false
  const [there] = await tx.select({ id: memberships.id }).from(memberships).where(and(eq(memberships.studioId, studioId), eq(memberships.personId, personId), isNull(memberships.leftAt)))
  if (!there) await giveParts(tx, { studioId, personId: offer.by, roles: by.roles }, personId, offer, now)
  return true
}

/** Takes an invitation back: its link opens nothing any more. */
export async function withdrawInvitation(db: Db, who: Actor, id: string, now: Date): Promise<void> {
  const mine = and(eq(tokens.studioId, who.studioId), eq(tokens.id, id), eq(tokens.kind, 'invite'))
  const [row] = await db.select({ usedAt: tokens.usedAt }).from(tokens).where(mine)
  if (found(row).usedAt === null) await db.update(tokens).set({ usedAt: now }).where(and(mine, isNull(tokens.usedAt)))
}
