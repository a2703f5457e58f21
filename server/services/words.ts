import { randomBytes } from 'node:crypto'
import { and, eq, inArray } from 'drizzle-orm'
import { ulid } from 'ulid'
import { sha256 } from '../../shared/lesson/canonical'
import type { DbOrTx, Tx } from '../db/client'
import { words } from '../db/schema/pieces'
import type { Actor } from './actor'

/** Keeps free text apart from the record that speaks of it, so that it can be erased. Returns its id and its hash. */
export async function keepWords(tx: Tx, who: Actor, text: string, now: Date, id = ulid(now.getTime())): Promise<{ id: string, hash: string }> {
  const salt = randomBytes(32).toString('hex')
  await tx.insert(words).values({ studioId: who.studioId, id, salt, text, by: who.personId, at: now })
  return { id, hash: sha256(salt + text) }
}

/** The texts of these ids, by id; what was erased is left out. */
export async function readWords(db: DbOrTx, studioId: string, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map()
  const rows = await db.select({ id: words.id, text: words.text, erasedAt: words.erasedAt }).from(words)
    .where(and(eq(words.studioId, studioId), inArray(words.id, [...ids])))
  return new Map(rows.filter(row => row.erasedAt === null).map(row => [row.id, row.text]))
}
