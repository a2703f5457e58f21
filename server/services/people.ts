import { and, desc, eq, gt, isNull, max } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { z } from 'zod'
import { dayIn } from '../../shared/bench/day'
import type { InviteBodySchema, RoleBodySchema } from '../../shared/schemas/people'
import { ROLES, type Role } from '../../shared/schemas/lists'
import type { PeopleList, PersonView } from '../../shared/types/entry'
import type { Db, Tx } from '../db/client'
import { people, tokens } from '../db/schema/people'
import { classes, classPeople, membershipRoles, memberships, studios } from '../db/schema/studio'
import { inTransaction } from '../db/transaction'
import type { Actor } from './actor'
import { namesOf } from './names'
import { found, refuse } from './refuse'
import { append } from './register'

/** Everyone of the studio, those who left last, with the start cards that are good now and the invitations that wait. */
export async function listPeople(db: Db, studioId: string, now: Date): Promise<PeopleList> {
  const rows = await db.select({ id: memberships.personId, roles: memberships.roles, ageBand: memberships.ageBand, joined: memberships.joined, leftAt: memberships.leftAt, email: people.emailKey, trailNo: memberships.trailNo })
    .from(memberships).innerJoin(people, eq(people.id, memberships.personId)).where(eq(memberships.studioId, studioId))
  const open = await db.select().from(tokens).where(and(eq(tokens.studioId, studioId), isNull(tokens.usedAt), gt(tokens.ends, now)))
  const cards = new Map(open.flatMap(token => token.kind === 'card' && token.personId ? [[token.personId, token.ends.toISOString()] as const] : []))
  const names = await namesOf(db, rows.map(row => row.id))
  const all = rows.map(({ email, joined, leftAt, ...row }) => ({ ...row, joined: joined.toISOString(), leftAt: leftAt?.toISOString() ?? null, name: names.get(row.id) ?? '', hasEmail: email !== null, cardUntil: cards.get(row.id) ?? null }))
  return {
    people: all.sort((a, b) => Number(a.leftAt !== null) - Number(b.leftAt !== null) || a.name.localeCompare(b.name)),
    invitations: open.flatMap(({ id, kind, offer, emailKey, ends }) => kind === 'invite' && offer ? [{ id, name: offer.name, email: emailKey ?? '', roles: offer.roles, ends: ends.toISOString() }] : []),
  }
}

/** One person of the studio: their parts with who gave them, and their classes. */
export async function personView(db: Db, studioId: string, personId: string): Promise<PersonView> {
  const mine = and(eq(memberships.studioId, studioId), eq(memberships.personId, personId))
  const [row] = await db.select({ roles: memberships.roles, ageBand: memberships.ageBand, joined: memberships.joined, leftAt: memberships.leftAt, trailNo: memberships.trailNo }).from(memberships).where(mine)
  const member = found(row)
  const acts = await db.select({ role: membershipRoles.role, act: membershipRoles.act, by: membershipRoles.by, at: membershipRoles.at }).from(membershipRoles)
    .where(and(eq(membershipRoles.studioId, studioId), eq(membershipRoles.personId, personId))).orderBy(desc(membershipRoles.at), desc(membershipRoles.id))
  const inClasses = await db.select({ id: classes.id, name: classes.name, fromOn: classPeople.fromOn, untilOn: classPeople.untilOn }).from(classPeople)
    .innerJoin(classes, and(eq(classes.studioId, classPeople.studioId), eq(classes.id, classPeople.classId))).where(and(eq(classPeople.studioId, studioId), eq(classPeople.personId, personId))).orderBy(desc(classPeople.fromOn))
  const names = await namesOf(db, [personId, ...acts.map(one => one.by)])
  return {
    id: personId, name: names.get(personId) ?? '', roles: member.roles, ageBand: member.ageBand, trailNo: member.trailNo, joined: member.joined.toISOString(), leftAt: member.leftAt?.toISOString() ?? null,
    acts: acts.map(({ role, act, by, at }) => ({ role, act, by: names.get(by) ?? '', at: at.toISOString() })), classes: inClasses,
  }
}

/** A membership with the studio's next trail number, or the old one of a person who comes back, and its row in the register. */
export async function join(tx: Tx, who: Actor, personId: string, ageBand: z.infer<typeof InviteBodySchema>['ageBand'], now: Date): Promise<void> {
  await tx.select({ id: studios.id }).from(studios).where(eq(studios.id, who.studioId)).for('update')
  const [last] = await tx.select({ no: max(memberships.trailNo) }).from(memberships).where(eq(memberships.studioId, who.studioId))
  await tx.insert(memberships).values({ studioId: who.studioId, id: ulid(now.getTime()), personId, trailNo: (last?.no ?? 1000) + 1, ageBand, roles: [], joined: now })
    .onDuplicateKeyUpdate({ set: { leftAt: null, ageBand } })
  await append(tx, who, { act: 'person-joined', objectKind: 'person', objectId: personId, body: { ageBand }, at: now })
}

/** Gives or ends a part: the act, the folded set and the register, in one. Nothing happens where it is so already. */
export async function actOnRole(tx: Tx, who: Actor, personId: string, { id, role, act }: z.infer<typeof RoleBodySchema>, now: Date): Promise<Role[]> {
  const [row] = await tx.select({ roles: memberships.roles }).from(memberships)
    .where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId), isNull(memberships.leftAt))).for('update')
  const roles = found(row).roles
  const [repeat] = await tx.select({ id: membershipRoles.id }).from(membershipRoles).where(and(eq(membershipRoles.studioId, who.studioId), eq(membershipRoles.id, id)))
  if (repeat) return roles
  if (roles.includes(role) === (act === 'given')) return roles
  if (role === 'manager' && act === 'ended') await keepAManager(tx, who.studioId, personId)
  const after = ROLES.filter(one => one === role ? act === 'given' : roles.includes(one))
  await tx.insert(membershipRoles).values({ studioId: who.studioId, id, personId, role, act, by: who.personId, at: now })
  await tx.update(memberships).set({ roles: after }).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
  await append(tx, who, { act: act === 'given' ? 'role-given' : 'role-ended', objectKind: 'person', objectId: personId, body: { role }, at: now })
  return after
}

/** Locks the managers' rows: two who end each other's part at once do not both succeed. */
async function keepAManager(tx: Tx, studioId: string, personId: string): Promise<void> {
  const rows = await tx.select({ id: memberships.personId, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, studioId), isNull(memberships.leftAt))).for('update')
  if (!rows.some(row => row.id !== personId && row.roles.includes('manager'))) refuse(422, 'A studio keeps at least one manager. Make someone else a manager first.')
}

/** A person leaves: the membership stays for the record, the roles do not count any more. */
export async function leave(db: Db, who: Actor, personId: string, now: Date): Promise<void> {
  await inTransaction(db, async (tx) => {
    const [row] = await tx.select({ leftAt: memberships.leftAt, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId))).for('update')
    if (found(row).leftAt) return
    if (row?.roles.includes('manager')) await keepAManager(tx, who.studioId, personId)
    for (const role of row?.roles ?? []) await actOnRole(tx, who, personId, { id: ulid(now.getTime()), role, act: 'ended' }, now)
    await endPlaces(tx, who.studioId, personId, now)
    await tx.update(memberships).set({ leftAt: now }).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
    await append(tx, who, { act: 'person-left', objectKind: 'person', objectId: personId, body: {}, at: now })
  })
}

/** Ends what a person who leaves could still come in by here, and their places in classes. */
async function endPlaces(tx: Tx, studioId: string, personId: string, now: Date): Promise<void> {
  const [studio] = await tx.select({ zone: studios.zone }).from(studios).where(eq(studios.id, studioId))
  await tx.update(tokens).set({ usedAt: now }).where(and(eq(tokens.studioId, studioId), eq(tokens.personId, personId), isNull(tokens.usedAt)))
  await tx.update(classPeople).set({ untilOn: dayIn(studio?.zone ?? 'UTC', now) }).where(and(eq(classPeople.studioId, studioId), eq(classPeople.personId, personId), isNull(classPeople.untilOn)))
}
