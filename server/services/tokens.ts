import { randomBytes, randomInt } from 'node:crypto'
import { and, eq, gt, isNull } from 'drizzle-orm'
import { ulid } from 'ulid'
import { sha256 } from '../../shared/lesson/canonical'
import type { TOKEN_KINDS } from '../../shared/schemas/lists'
import type { DbOrTx, Tx } from '../db/client'
import { tokens } from '../db/schema/people'

type TokenKind = (typeof TOKEN_KINDS)[number]
export interface TokenFor { kind: TokenKind, personId: string | null, emailKey: string | null, studioId: string | null, ends: Date }

/** Letters that are told apart in print and by hand: no 0 and O, no 1, I and L, no vowels that make words. */
const CARD_LETTERS = '23456789BCDFGHJKMNPQRSTVWXZ'
const CARD_LENGTH = 8

/** A secret of 256 bits for a mailed link. Only its hash is kept. */
export async function makeToken(tx: DbOrTx, about: TokenFor, now: Date): Promise<string> {
  const secret = randomBytes(32).toString('base64url')
  await tx.insert(tokens).values({ id: ulid(now.getTime()), hash: sha256(secret), ...about })
  return secret
}

/** A start card's code, as BDFG-2345: 27^8 of them, good for one evening, and tries at it are counted. */
export async function makeCard(tx: DbOrTx, about: Omit<TokenFor, 'kind'>, now: Date): Promise<string> {
  const letters = Array.from({ length: CARD_LENGTH }, () => CARD_LETTERS[randomInt(CARD_LETTERS.length)]).join('')
  await tx.insert(tokens).values({ id: ulid(now.getTime()), kind: 'card', hash: sha256(`card ${letters}`), ...about })
  return `${letters.slice(0, 4)}-${letters.slice(4)}`
}

export const cardHash = (code: string): string => sha256(`card ${code.toUpperCase().replace(/[^0-9A-Z]/g, '')}`)

/** A token that is still good, or null. */
export async function goodToken(db: DbOrTx, hash: string, now: Date) {
  const [row] = await db.select().from(tokens).where(and(eq(tokens.hash, hash), isNull(tokens.usedAt), gt(tokens.ends, now)))
  return row ?? null
}

/** Uses a token up. False when someone was faster. */
export async function useToken(tx: Tx, id: string, now: Date): Promise<boolean> {
  const [row] = await tx.select({ usedAt: tokens.usedAt }).from(tokens).where(eq(tokens.id, id)).for('update')
  if (!row || row.usedAt) return false
  await tx.update(tokens).set({ usedAt: now }).where(eq(tokens.id, id))
  return true
}
