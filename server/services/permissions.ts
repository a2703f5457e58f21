import { and, asc, eq } from 'drizzle-orm'
import { foldPermissions, permissionReasons } from '../../shared/judging/permissions'
import type { HeldPermission } from '../../shared/judging/gates'
import { NOTHING_HELD } from '../../shared/judging/signer'
import { type Permission, PERMISSIONS } from '../../shared/lesson/schema'
import type { PermissionBody } from '../../shared/schemas/judging'
import type { PermissionsView } from '../../shared/types/judging'
import type { Db, DbOrTx } from '../db/client'
import { permissionActs } from '../db/schema/judging'
import { memberships } from '../db/schema/studio'
import { inTransaction, isDuplicate } from '../db/transaction'
import type { Actor } from './actor'
import { tiesOf, todayOf } from './judging-facts'
import { currentNames, nameIn } from './names'
import { found, refuse } from './refuse'
import { append } from './register'
import { lockPerson } from './sign-offs'
import { keepWords, readWords } from './words'

async function actsOf(db: DbOrTx, studioId: string, personId: string) {
  return await db.select().from(permissionActs).where(and(eq(permissionActs.studioId, studioId), eq(permissionActs.personId, personId)))
    .orderBy(asc(permissionActs.at), asc(permissionActs.id))
}

/** What a person holds today of the permissions a lesson asks for. Customers' goods are a matter of their own. */
export async function heldPermissions(db: DbOrTx, studioId: string, personId: string, asked: readonly Permission[]): Promise<HeldPermission[]> {
  const needed = asked.filter(permission => permission !== 'goods')
  if (needed.length === 0) return []
  const held = foldPermissions(await actsOf(db, studioId, personId))
  return needed.map(permission => ({ permission, state: held[permission] ?? 'none' }))
}

/** A person's permissions today, and every act that led there. */
export async function permissionsView(db: Db, who: Actor, personId: string): Promise<PermissionsView> {
  const [member] = await db.select({ id: memberships.id }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
  found(member)
  const acts = await actsOf(db, who.studioId, personId)
  const names = await currentNames(db, acts.map(act => act.by))
  const words = await readWords(db, who.studioId, acts.flatMap(act => act.wordsId ?? []))
  const held = foldPermissions(acts)
  return {
    held: PERMISSIONS.filter(permission => permission !== 'goods').map(permission => ({ permission, state: held[permission] ?? 'none' })),
    acts: acts.map(({ id, permission, act, limit, by, at, wordsId }) => ({ id, permission, act, limit, by: nameIn(names, by), at: at.toISOString(), words: wordsId ? words.get(wordsId) ?? null : null })),
  }
}

/** Grants, suspends, lifts, limits, withdraws or gives back a permission, in the register. The same id again is the same act. */
export async function actOnPermission(db: Db, who: Actor, personId: string, body: PermissionBody, now: Date): Promise<{ id: string, isNew: boolean }> {
  try {
    return await inTransaction(db, async (tx) => {
      await lockPerson(tx, who.studioId, personId)
      const acts = await actsOf(tx, who.studioId, personId)
      if (acts.some(act => act.id === body.id)) return { id: body.id, isNew: false }
      const [member] = await tx.select({ ageBand: memberships.ageBand }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
      const { settings } = await todayOf(tx, who.studioId, now)
      const maker = { personId, name: nameIn(await currentNames(tx, [personId]), personId).split(' ')[0] ?? '' }
      const facts = { settings, signer: { personId: who.personId, roles: who.roles, held: NOTHING_HELD }, maker, tie: (await tiesOf(tx, who.studioId, who.personId)).get(personId) ?? null, ageBand: found(member).ageBand, acts }
      const [reason] = permissionReasons(facts, body.permission, body.act, body.words)
      if (reason) refuse(reason.code === 'own-work' || reason.code === 'tie' || reason.code === 'not-instructor' ? 403 : 422, reason.says)
      const words = body.words === '' ? null : await keepWords(tx, who, body.words, now)
      const limit = body.act === 'limit' ? body.limit : null
      const last = acts.filter(act => act.permission === body.permission).at(-1)
      await tx.insert(permissionActs).values({ studioId: who.studioId, id: body.id, personId, permission: body.permission, lessonId: null, act: body.act, limit, by: who.personId, at: now, wordsId: words?.id ?? null, of: last?.id ?? null })
      await append(tx, who, { act: 'permission', objectKind: 'permission', objectId: body.id, at: now, body: { person: personId, permission: body.permission, act: body.act, words: words?.hash ?? null, of: last?.id ?? null } })
      return { id: body.id, isNew: true }
    })
  }
  catch (error) {
    if (isDuplicate(error)) refuse(409, 'This act was made before, about another person. Open the page again.')
    throw error
  }
}
