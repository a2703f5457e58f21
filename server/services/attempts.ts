import { eq, sql } from 'drizzle-orm'
import { sha256 } from '../../shared/lesson/canonical'
import type { Db } from '../db/client'
import { attempts } from '../db/schema/people'
import { refuse } from './refuse'

/**
 * Wrong tries in a quarter of an hour. `account`: one account from one address; `anywhere`: one account from all, higher,
 * so that a stranger elsewhere does not shut its person out; `address`: all accounts from one address, which may be a
 * whole class behind one line; `card`: start cards from one address; `signing`: the password asked again of one who is in, who
 * may press twenty times at once.
 */
export const LIMITS = { account: 10, anywhere: 60, address: 120, card: 60, letter: 5, signing: 30 } as const
export type LimitKind = keyof typeof LIMITS
const WINDOW_MS = 15 * 60_000

/** Counts one try, in the database, so that a restart forgets nothing. 429 with the minutes left past the limit. */
export async function countTry(db: Db, kind: LimitKind, of: string, now: Date): Promise<void> {
  const key = sha256(`${kind} ${of}`)
  const ends = new Date(now.getTime() + WINDOW_MS)
  await db.insert(attempts).values({ key, points: 1, ends }).onDuplicateKeyUpdate({
    // Read from left to right: `points` still sees the old `ends`.
    set: { points: sql`if(${attempts.ends} <= ${now}, 1, least(${attempts.points} + 1, 1000))`, ends: sql`if(${attempts.ends} <= ${now}, ${ends}, ${attempts.ends})` },
  })
  const [row] = await db.select().from(attempts).where(eq(attempts.key, key))
  if (!row || row.points <= LIMITS[kind]) return
  const minutes = Math.max(1, Math.ceil((row.ends.getTime() - now.getTime()) / 60_000))
  refuse(429, `That were too many tries. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}, or ask your studio for a start card.`)
}

/** Gives a right try back, so that a class that all come in well leave nothing on their address. */
export async function giveBackTry(db: Db, kind: LimitKind, of: string): Promise<void> {
  await db.update(attempts).set({ points: sql`greatest(${attempts.points} - 1, 0)` }).where(eq(attempts.key, sha256(`${kind} ${of}`)))
}

/** A right password clears the account's count. */
export async function forgetTries(db: Db, kind: LimitKind, of: string): Promise<void> {
  await db.delete(attempts).where(eq(attempts.key, sha256(`${kind} ${of}`)))
}
