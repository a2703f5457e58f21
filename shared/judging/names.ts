/** The second name under a level, and the founding level of a lesson that nobody may teach yet. */
import type { Role, SignOffKind } from '../schemas/lists'
import { may } from './roles'
import { type Pair, type Reason, secondSignerReasons } from './signer'

export interface SecondNameFacts extends Pair {
  signOff: { by: string, level: number, kind: SignOffKind, isInForce: boolean }
  /** Who has put their second name under it already. */
  named: readonly string[]
}

/** What keeps this person from giving the second name under this sign-off. */
export function secondNameReasons(facts: SecondNameFacts): Reason[] {
  const { signOff, signer, named } = facts
  const reasons = secondSignerReasons(facts)
  if (signOff.by === signer.personId) reasons.push({ code: 'first-name', says: 'Yours is the first name. The second is another person’s.' })
  if (signOff.level < 4 || (signOff.kind !== 'sign' && signOff.kind !== 'refresh') || !signOff.isInForce) reasons.push({ code: 'no-second-name', says: 'This sign-off does not wait for a second name.' })
  else if (named.length > 0) reasons.push({ code: 'named-twice', says: 'It has its second name already.' })
  return reasons
}

export interface FoundingFacts {
  roles: readonly Role[]
  /** Roles here of the person who would hold it. */
  holder: { name: string, roles: readonly Role[] }
  /** Does anybody hold 5 in the lesson today, and was anybody signed in it yet? A studio founds its first teachers together. */
  isHeld: boolean
}

/** What keeps a manager from giving a founding level: somebody must be able to sign first, and it is shown as such for ever. */
export function foundingReasons({ roles, holder, isHeld }: FoundingFacts): Reason[] {
  const reasons: Reason[] = []
  if (!may(roles, 'found')) reasons.push({ code: 'not-manager', says: 'A founding level is given by the manager.' })
  if (!may(holder.roles, 'sign')) reasons.push({ code: 'not-teaching', says: `${holder.name} is not an instructor of this studio.` })
  if (isHeld) reasons.push({ code: 'founded', says: 'Somebody holds May teach, 5, in this lesson. They sign; a founding level is only for where nobody can.' })
  return reasons
}
