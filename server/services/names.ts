import { inArray } from 'drizzle-orm'
import type { DbOrTx } from '../db/client'
import { personNames } from '../db/schema/people'

/** The name each of these people goes by now. */
export async function namesOf(db: DbOrTx, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map()
  const rows = await db.select().from(personNames).where(inArray(personNames.personId, [...new Set(ids)])).orderBy(personNames.version)
  return new Map(rows.map(row => [row.personId, row.name]))
}
