import { and, desc, eq, isNull, max } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { z } from 'zod'
import { dayIn } from '../../shared/bench/day'
import type { InviteBodySchema, RoleBodySchema } from '../../shared/schemas/people'
import { ROLES, type Role } from '../../shared/schemas/lists'
import type { Db, DbOrTx, Tx } from '../db/client'
import { people, personNames } from '../db/schema/people'
import { classes, classPeople, membershipRoles, memberships, studios } from '../db/schema/studio'
import { inTransaction } from '../db/transaction'
import type { Actor } from './actor'
import { emailKey } from './come-in'
import { queueMail } from './mail'
import { currentNames, nameIn } from './names'
import { found, refuse } from './refuse'
import { append } from './register'
import { makeToken } from './tokens'

const INVITATION_MS = 14 * 86_400_000

/** Everyone of the studio, those who left last. */
export async function listPeople(db: Db, studioId: string) {
  const rows = await db.select({ id: memberships.personId, roles: memberships.roles, ageBand: memberships.ageBand, joined: memberships.joined, leftAt: memberships.leftAt, email: people.email, trailNo: memberships.trailNo })
    .from(memberships).innerJoin(people, eq(people.id, memberships.personId)).where(eq(memberships.studioId, studioId))
  const names = await currentNames(db, rows.map(row => row.id))
  return rows.map(row => ({ ...row, name: nameIn(names, row.id), hasEmail: row.email !== null }))
    .map(({ email: _email, ...row }) => row)
    .sort((a, b) => Number(a.leftAt !== null) - Number(b.leftAt !== null) || a.name.localeCompare(b.name))
}

/** Takes a person into the studio: known by e-mail already, or new. With an e-mail they get a letter. */
export async function invite(db: Db, who: Actor, body: z.infer<typeof InviteBodySchema>, now: Date): Promise<{ personId: string }> {
  return await inTransaction(db, async (tx) => {
    const personId = await personFor(tx, body, now)
    const [there] = await tx.select({ leftAt: memberships.leftAt }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
    if (there && personId !== body.id) refuse(409, 'This person is in the studio already.', { fieldErrors: { email: ['This person is in the studio already.'] } })
    if (there) return { personId }
    await join(tx, who, personId, body.ageBand, now)
    for (const role of body.roles) await actOnRole(tx, who, personId, { id: ulid(now.getTime()), role, act: 'given' }, now)
    if (body.classId) await putInClass(tx, who, body.classId, personId, now)
    if (body.email) {
      const token = await makeToken(tx, { kind: 'invite', personId, emailKey: emailKey(body.email), studioId: who.studioId, ends: new Date(now.getTime() + INVITATION_MS) }, now)
      await queueMail(tx, { studioId: who.studioId, toPerson: personId, kind: 'invitation', body: { token, by: who.personId }, dedupeKey: `invitation ${personId} ${who.studioId} ${now.getTime()}` }, now)
    }
    return { personId }
  })
}

async function personFor(tx: Tx, body: Pick<z.infer<typeof InviteBodySchema>, 'id' | 'name' | 'email'>, now: Date): Promise<string> {
  const key = body.email ? emailKey(body.email) : null
  const [known] = key ? await tx.select({ id: people.id }).from(people).where(eq(people.emailKey, key)) : await tx.select({ id: people.id }).from(people).where(eq(people.id, body.id))
  if (known) return known.id
  await tx.insert(people).values({ id: body.id, email: body.email ?? null, emailKey: key, wants: {} })
  await tx.insert(personNames).values({ personId: body.id, version: 1, name: body.name, fromAt: now })
  return body.id
}

/** A membership with the studio's next trail number, and its row in the register. */
export async function join(tx: Tx, who: Actor, personId: string, ageBand: z.infer<typeof InviteBodySchema>['ageBand'], now: Date): Promise<void> {
  await tx.select({ id: studios.id }).from(studios).where(eq(studios.id, who.studioId)).for('update')
  const [last] = await tx.select({ no: max(memberships.trailNo) }).from(memberships).where(eq(memberships.studioId, who.studioId))
  await tx.insert(memberships).values({ studioId: who.studioId, id: ulid(now.getTime()), personId, trailNo: (last?.no ?? 1000) + 1, ageBand, roles: [], joined: now })
  await append(tx, who, { act: 'person-joined', objectKind: 'person', objectId: personId, body: { ageBand }, at: now })
}

/** Gives or ends a part: the act, the folded set and the register, in one. Nothing happens where it is so already. */
export async function actOnRole(tx: Tx, who: Actor, personId: string, { id, role, act }: z.infer<typeof RoleBodySchema>, now: Date): Promise<Role[]> {
  const [row] = await tx.select({ roles: memberships.roles }).from(memberships)
    .where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId), isNull(memberships.leftAt))).for('update')
  const roles = found(row).roles
  if (roles.includes(role) === (act === 'given')) return roles
  if (role === 'manager' && act === 'ended') await keepAManager(tx, who.studioId, personId)
  const after = ROLES.filter(one => one === role ? act === 'given' : roles.includes(one))
  await tx.insert(membershipRoles).values({ studioId: who.studioId, id, personId, role, act, by: who.personId, at: now })
  await tx.update(memberships).set({ roles: after }).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
  await append(tx, who, { act: act === 'given' ? 'role-given' : 'role-ended', objectKind: 'person', objectId: personId, body: { role }, at: now })
  return after
}

async function keepAManager(tx: Tx, studioId: string, personId: string): Promise<void> {
  const rows = await tx.select({ id: memberships.personId, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, studioId), isNull(memberships.leftAt)))
  if (!rows.some(row => row.id !== personId && row.roles.includes('manager'))) refuse(422, 'A studio keeps at least one manager. Make someone else a manager first.')
}

/** A person leaves: the membership stays for the record, the roles do not count any more. */
export async function leave(db: Db, who: Actor, personId: string, now: Date): Promise<void> {
  await inTransaction(db, async (tx) => {
    const [row] = await tx.select({ leftAt: memberships.leftAt, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId))).for('update')
    if (found(row).leftAt) return
    if (row?.roles.includes('manager')) await keepAManager(tx, who.studioId, personId)
    for (const role of row?.roles ?? []) await actOnRole(tx, who, personId, { id: ulid(now.getTime()), role, act: 'ended' }, now)
    await tx.update(memberships).set({ leftAt: now }).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
    await append(tx, who, { act: 'person-left', objectKind: 'person', objectId: personId, body: {}, at: now })
  })
}

/** Puts a person of the studio into a class from today on. */
export async function putInClass(tx: DbOrTx, who: Actor, classId: string, personId: string, now: Date): Promise<void> {
  const [there] = await tx.select({ zone: studios.zone }).from(classes).innerJoin(studios, eq(studios.id, classes.studioId)).where(and(eq(classes.studioId, who.studioId), eq(classes.id, classId)))
  const [member] = await tx.select({ id: memberships.id }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId), isNull(memberships.leftAt)))
  const { zone } = found(there)
  found(member)
  const [latest] = await tx.select({ fromOn: classPeople.fromOn, untilOn: classPeople.untilOn }).from(classPeople)
    .where(and(eq(classPeople.studioId, who.studioId), eq(classPeople.classId, classId), eq(classPeople.personId, personId))).orderBy(desc(classPeople.fromOn)).limit(1)
  if (latest && latest.untilOn === null) return
  await tx.insert(classPeople).values({ studioId: who.studioId, classId, personId, fromOn: dayIn(zone, now) })
}
