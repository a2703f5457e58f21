import { asc, eq } from 'drizzle-orm'
import { canonical, shaOf } from '../../shared/lesson/canonical'
import type { DbOrTx, Tx } from '../db/client'
import { register, registerHeads } from '../db/schema/judging'
import type { Actor } from './actor'

/** What may stand in the register: ids, codes, numbers, hashes. No name and no free text. */
export type RegisterBody = Record<string, string | number | boolean | null | string[]>

export const REGISTER_ACTS = [
  'revision-into-use', 'revision-withdrawn', 'revision-withdrawn-danger', 'revision-back-in-use',
  'sign', 'countersign', 'correction', 'refresh', 'founding',
  'permission', 'role-given', 'role-ended', 'setting', 'person-joined', 'person-left', 'person-erased',
] as const
export type RegisterAct = (typeof REGISTER_ACTS)[number]

export interface RegisterEntry { act: RegisterAct, objectKind: string, objectId: string, body: RegisterBody, at: Date }

const START = '0'.repeat(64)

/**
 * Adds one row to the studio's chain. The head is locked until the transaction ends, so call it last.
 * The hash covers canonical {studio, seq, at, actor, act, object, body, prev}.
 */
export async function append(tx: Tx, who: Actor, entry: RegisterEntry): Promise<{ seq: number, hash: string }> {
  await tx.insert(registerHeads).values({ studioId: who.studioId, seq: 0, hash: START }).onDuplicateKeyUpdate({ set: { studioId: who.studioId } })
  const [head] = await tx.select().from(registerHeads).where(eq(registerHeads.studioId, who.studioId)).for('update')
  const prev = head?.hash ?? START
  const seq = (head?.seq ?? 0) + 1
  const row = {
    studioId: who.studioId, seq, at: entry.at, actor: who.personId, actorRole: who.roles.join(','), act: entry.act,
    objectKind: entry.objectKind, objectId: entry.objectId, body: canonical(entry.body), prev,
  }
  const hash = hashOf(row)
  await tx.insert(register).values({ ...row, hash })
  await tx.update(registerHeads).set({ seq, hash }).where(eq(registerHeads.studioId, who.studioId))
  return { seq, hash }
}

type Row = Omit<typeof register.$inferSelect, 'hash'>

function hashOf(row: Row): string {
  return shaOf({
    studio: row.studioId, seq: row.seq, at: row.at.toISOString(), actor: row.actor, role: row.actorRole, act: row.act,
    object: { kind: row.objectKind, id: row.objectId }, body: JSON.parse(row.body), prev: row.prev,
  })
}

/** Goes along a studio's chain. `broken` is the first row that does not follow from the one before, or null. */
export async function verify(db: DbOrTx, studioId: string): Promise<{ rows: number, broken: number | null }> {
  const rows = await db.select().from(register).where(eq(register.studioId, studioId)).orderBy(asc(register.seq))
  let prev = START
  for (const [index, row] of rows.entries()) {
    if (row.seq !== index + 1 || row.prev !== prev || row.hash !== hashOf(row)) return { rows: rows.length, broken: row.seq }
    prev = row.hash
  }
  const [head] = await db.select().from(registerHeads).where(eq(registerHeads.studioId, studioId))
  const whole = (head?.seq ?? 0) === rows.length && (head?.hash ?? START) === prev
  return { rows: rows.length, broken: whole ? null : rows.length + 1 }
}
