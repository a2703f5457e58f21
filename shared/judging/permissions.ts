/** What is held of the permissions that no level implies: flame, motors, pickle, mill, goods. */
import type { Permission } from '../lesson/schema'
import type { AgeBand, PermissionAct as Act, RelationKind } from '../schemas/lists'
import type { HeldPermission } from './gates'
import type { JudgingSettings } from './settings'
import { type Maker, pairReasons, type Reason, type Signer } from './signer'

export type PermissionState = HeldPermission['state']
export interface PermissionActed { permission: Permission, act: Act, by: string }

const AFTER: Record<Act, PermissionState> = { grant: 'held', lift: 'held', limit: 'held', regain: 'held', suspend: 'suspended', withdraw: 'none' }
/** What each act may follow on. */
const FROM: Record<Act, readonly PermissionState[]> = { grant: ['none'], regain: ['none'], suspend: ['held'], lift: ['suspended'], limit: ['held', 'suspended'], withdraw: ['held', 'suspended'] }
export const PERMISSION_WORDS: Record<Permission, string> = { flame: 'Flame', motors: 'Motors', pickle: 'Pickle and chemicals', mill: 'Rolling mill and presses', goods: 'Customers’ goods' }

/** What is held after these acts, oldest first: the last one of each permission decides. */
export function foldPermissions(acts: readonly Pick<PermissionActed, 'permission' | 'act'>[]): Partial<Record<Permission, PermissionState>> {
  const held: Partial<Record<Permission, PermissionState>> = {}
  for (const { permission, act } of acts) held[permission] = AFTER[act]
  return held
}

export interface PermissionFacts {
  settings: JudgingSettings
  signer: Signer
  maker: Maker
  tie: RelationKind | null
  ageBand: AgeBand
  /** Every act on this person's permissions, oldest first. */
  acts: readonly PermissionActed[]
}

/** What keeps this person from this act; empty when nothing does. Stopping at once is any instructor's; lifting is another's. */
export function permissionReasons(facts: PermissionFacts, permission: Permission, act: Act, words: string): Reason[] {
  const { settings, signer, maker, acts, ageBand } = facts
  const reasons = act === 'suspend' ? pairReasons({ ...facts, tie: null }) : pairReasons(facts)
  const state = foldPermissions(acts)[permission] ?? 'none'
  const last = acts.filter(one => one.permission === permission).at(-1)
  if (permission === 'goods') reasons.push({ code: 'permission', says: 'Customers’ goods are permitted lesson by lesson, with a second name; not here.' })
  if (!FROM[act].includes(state)) reasons.push({ code: 'permission', says: `${PERMISSION_WORDS[permission]} is ${state === 'none' ? 'not held' : state} by ${maker.name} now.` })
  if (ageBand !== 'adult' && AFTER[act] === 'held' && settings.youngForbid.includes(permission)) reasons.push({ code: 'permission', says: `${PERMISSION_WORDS[permission]} is not open to ${maker.name}: this studio’s rule for under-18s.` })
  if (state === 'suspended' && last?.act === 'suspend' && last.by === signer.personId) reasons.push({ code: 'first-name', says: 'You suspended it. Another person reviews it.' })
  if (act !== 'grant' && act !== 'regain' && words.trim() === '') reasons.push({ code: 'permission', says: 'Say why, in a sentence.' })
  return reasons
}
