import type { H3Event } from 'h3'
import { countTry, forgetTries } from '#server/services/attempts'
import { type Passwords, passwordsAt, SHIPPED_LOG2 } from '#server/services/passwords'
import { passwordHashOf } from '#server/services/come-in'
import { refuse } from '#server/services/refuse'
import type { Who } from './guards'

let passwords: Passwords | null = null

export function usePasswords(): Passwords {
  passwords ??= passwordsAt(Number(useRuntimeConfig().scryptLog2) || SHIPPED_LOG2)
  return passwords
}

/** The person's own password once more, for an act that is signed. 422 when it is another one; tries are counted as at the door. */
export async function requirePassword(event: H3Event, who: Pick<Who, 'personId'>, password: string): Promise<void> {
  const db = useDatabase()
  await countTry(db, 'signing', who.personId, now(event))
  if (!await usePasswords().check(await passwordHashOf(db, who.personId), password)) refuse(422, 'That is not your password. Nothing was signed.', { fieldErrors: { password: ['That is not your password.'] } })
  await forgetTries(db, 'signing', who.personId)
}
