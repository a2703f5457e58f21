import { asc, inArray } from 'drizzle-orm'
import type { DbOrTx } from '../db/client'
import { personNames } from '../db/schema/people'

export interface CurrentName { name: string, version: number }

/** The name each of these people goes by now, with the version a record holds. */
export async function currentNames(db: DbOrTx, ids: readonly string[]): Promise<Map<string, CurrentName>> {
  if (ids.length === 0) return new Map()
  const rows = await db.select().from(personNames).where(inArray(personNames.personId, [...new Set(ids)])).orderBy(asc(personNames.version))
  return new Map(rows.map(({ personId, name, version }) => [personId, { name, version }]))
}

/** The name each of these people goes by now. */
export async function namesOf(db: DbOrTx, ids: readonly string[]): Promise<Map<string, string>> {
  return new Map([...await currentNames(db, ids)].map(([id, { name }]) => [id, name]))
}

/** A name as it is said on a screen; one that is gone is said as such. */
export const nameIn = (names: ReadonlyMap<string, CurrentName>, id: string): string => names.get(id)?.name ?? 'A person no longer here'
