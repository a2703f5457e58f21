import { inArray } from 'drizzle-orm'
import type { DbOrTx } from '../db/client'
import { personNames } from '../db/schema/people'

export interface CurrentName { name: string, version: number }

/** The names people go by now, with the version a record holds. */
export async function currentNames(db: DbOrTx, ids: readonly string[]): Promise<Map<string, CurrentName>> {
  const names = new Map<string, CurrentName>()
  if (ids.length === 0) return names
  const rows = await db.select({ personId: personNames.personId, name: personNames.name, version: personNames.version }).from(personNames)
    .where(inArray(personNames.personId, [...new Set(ids)]))
  for (const { personId, name, version } of rows) {
    if ((names.get(personId)?.version ?? -1) < version) names.set(personId, { name, version })
  }
  return names
}

/** A name as it is said on a screen; one that is gone is said as such. */
export const nameIn = (names: Map<string, CurrentName>, id: string): string => names.get(id)?.name ?? 'A person no longer here'
