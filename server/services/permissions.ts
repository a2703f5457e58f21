import { and, asc, eq } from 'drizzle-orm'
import type { Permission } from '../../shared/lesson/schema'
import { foldPermissions } from '../../shared/judging/permissions'
import type { HeldPermission } from '../../shared/judging/gates'
import type { DbOrTx } from '../db/client'
import { permissionActs } from '../db/schema/judging'

/** What a person holds today of the permissions a lesson asks for. Customers' goods are a matter of their own. */
export async function heldPermissions(db: DbOrTx, studioId: string, personId: string, asked: readonly Permission[]): Promise<HeldPermission[]> {
  const needed = asked.filter(permission => permission !== 'goods')
  if (needed.length === 0) return []
  const acts = await db.select({ permission: permissionActs.permission, act: permissionActs.act }).from(permissionActs)
    .where(and(eq(permissionActs.studioId, studioId), eq(permissionActs.personId, personId))).orderBy(asc(permissionActs.at), asc(permissionActs.id))
  const held = foldPermissions(acts)
  return needed.map(permission => ({ permission, state: held[permission] ?? 'none' }))
}
