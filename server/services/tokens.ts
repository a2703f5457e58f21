import { randomBytes, randomInt } from 'node:crypto'
import { and, eq, gt, isNull } from 'drizzle-orm'
import { ulid } from 'ulid'
import { sha256 } from '../../shared/lesson/canonical'
import type { TOKEN_KINDS } from '../../shared/schemas/lists'
import type { DbOrTx, Tx } from '../db/client'
import { type Offer, tokens } from '../db/schema/people'
import { isDuplicate } from '../db/transaction'

type TokenKind = (typeof TOKEN_KINDS)[number]
export interface TokenFor { kind: TokenKind, personId: string | null, emailKey: string | null, studioId: string | null, ends: Date }

/** Letters that are told apart in print and by hand: no 0 and O, no 1, I and L, no vowels that make words. */
const CARD_LETTERS = '23456789BCDFGHJKMNPQRSTVWXZ'
const CARD_LENGTH = 8

const secretOf = (): string => randomBytes(32).toString('base64url')

/** A token for a mailed link. Its secret is made when the letter is written, so that no table ever holds one. False for a repeat of the same id. */
export async function openToken(tx: Tx, id: string, about: TokenFor & { offer?: Offer }): Promise<boolean> {
  try {
    await tx.insert(tokens).values({ id, hash: sha256(secretOf()), ...about })
    return true
  }
  catch (error) {
    if (isDuplicate(error)) return false
    throw error
  }
}

/** A secret of 256 bits for this link, in place of any earlier one, or null where the link is used up or too old. Only its hash is kept. */
export async function freshSecret(db: DbOrTx, id: string, now: Date): Promise<string | null> {
  const secret = secretOf()
  const [done] = await db.update(tokens).set({ hash: sha256(secret) }).where(and(eq(tokens.id, id), isNull(tokens.usedAt), gt(tokens.ends, now)))
  return done.affectedRows === 1 ? secret : null
}

/** A start card's code, as BDFG-2345: 27^8 of them, good for one evening, and tries at it are counted. An earlier card of the person here ends. */
export async function makeCard(tx: DbOrTx, about: { personId: string, studioId: string, ends: Date }, now: Date): Promise<string> {
  await tx.update(tokens).set({ usedAt: now }).where(and(eq(tokens.kind, 'card'), eq(tokens.personId, about.personId), eq(tokens.studioId, about.studioId), isNull(tokens.usedAt)))
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
