/** What is held of the permissions that no level implies: flame, motors, pickle, mill, goods. */
import type { Permission } from '../lesson/schema'
import type { PERMISSION_ACTS } from '../schemas/lists'
import type { HeldPermission } from './gates'

export interface PermissionAct { permission: Permission, act: (typeof PERMISSION_ACTS)[number] }

const AFTER: Record<PermissionAct['act'], HeldPermission['state']> = { grant: 'held', lift: 'held', limit: 'held', regain: 'held', suspend: 'suspended', withdraw: 'none' }

/** What is held after these acts, oldest first: the last one of each permission decides. */
export function foldPermissions(acts: readonly PermissionAct[]): Partial<Record<Permission, HeldPermission['state']>> {
  const held: Partial<Record<Permission, HeldPermission['state']>> = {}
  for (const { permission, act } of acts) held[permission] = AFTER[act]
  return held
}
