/** Which role may do which act. Roles are a set: a person may do what any of their roles may. */
import type { Role } from '../schemas/lists'

export const ACTS = [
  'make-pieces', 'see-own-record', 'ask-for-a-look',
  'see-lessons', 'write-lessons', 'put-into-use',
  'see-classes', 'give-cards', 'see-pieces', 'judge', 'witness', 'sign', 'countersign-goods', 'suspend',
  'manage-people', 'manage-classes', 'manage-studio', 'found', 'see-record',
] as const
export type Act = (typeof ACTS)[number]

export const MAY: Record<Role, readonly Act[]> = {
  apprentice: ['make-pieces', 'see-own-record', 'ask-for-a-look'],
  instructor: ['make-pieces', 'see-own-record', 'ask-for-a-look', 'see-lessons', 'write-lessons', 'put-into-use', 'see-classes', 'give-cards', 'see-pieces', 'judge', 'witness', 'sign', 'suspend'],
  manager: ['see-lessons', 'see-classes', 'give-cards', 'see-pieces', 'see-record', 'countersign-goods', 'manage-people', 'manage-classes', 'manage-studio', 'found'],
  assessor: ['see-record'],
}

export function may(roles: readonly Role[], act: Act): boolean {
  return roles.some(role => MAY[role].includes(act))
}
