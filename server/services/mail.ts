import { and, asc, eq, inArray, lte, sql } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { MailKind } from '../../shared/schemas/lists'
import type { Db, Tx } from '../db/client'
import { mail, people } from '../db/schema/people'
import { inTransaction, isDuplicate } from '../db/transaction'
import { type Letter, letterOf } from './letters'

export interface QueuedMail { studioId: string | null, toPerson?: string, toAddress?: string, kind: MailKind, body: Record<string, string | number | boolean | null>, dedupeKey: string }

/** Puts a letter in the queue, in the transaction of the act it tells of. The same key twice is one letter. */
export async function queueMail(tx: Tx, letter: QueuedMail, now: Date): Promise<void> {
  await tx.insert(mail).values({
    id: ulid(now.getTime()), studioId: letter.studioId, toPerson: letter.toPerson ?? null, toAddress: letter.toAddress ?? null, kind: letter.kind, body: letter.body, nextAt: now, dedupeKey: letter.dedupeKey,
  }).onDuplicateKeyUpdate({ set: { dedupeKey: sql`dedupe_key` } })
}

export interface Post { send: (letter: Letter & { to: string }) => Promise<unknown>, publicUrl: string }

const MOST_TRIES = 8
const AT_ONCE = 20

/** Sends what is due. A letter that cannot be sent waits longer each time, and is given up, visibly, after eight tries. */
export async function sendWaiting(db: Db, post: Post, now: Date): Promise<number> {
  let sent = 0
  for (const row of await claim(db, now)) {
    try {
      const to = row.toAddress ?? await addressOf(db, row.toPerson)
      if (to) {
        await post.send({ to, ...await letterOf(db, row, post.publicUrl) })
        sent++
      }
      await db.update(mail).set({ state: 'sent', sentAt: now, toAddress: null, body: {} }).where(eq(mail.id, row.id))
    }
    catch (error) {
      if (isDuplicate(error)) throw error
      const tries = row.tries + 1
      const nextAt = new Date(now.getTime() + 60_000 * 2 ** Math.min(tries, 8))
      await db.update(mail).set({ state: tries >= MOST_TRIES ? 'given-up' : 'waits', tries, nextAt }).where(eq(mail.id, row.id))
      if (tries >= MOST_TRIES) console.error(`A letter (${row.kind}, ${row.id}) was given up after ${tries} tries.`)
    }
  }
  return sent
}

/** Takes letters that are due and marks them, so that no other sender takes them; one that was left half sent comes again after ten minutes. */
async function claim(db: Db, now: Date) {
  return await inTransaction(db, async (tx) => {
    const rows = await tx.select().from(mail).where(and(inArray(mail.state, ['waits', 'sending']), lte(mail.nextAt, now))).orderBy(asc(mail.nextAt)).limit(AT_ONCE).for('update', { skipLocked: true })
    if (rows.length > 0) await tx.update(mail).set({ state: 'sending', nextAt: new Date(now.getTime() + 600_000) }).where(inArray(mail.id, rows.map(row => row.id)))
    return rows
  })
}

async function addressOf(db: Db, personId: string | null): Promise<string | null> {
  if (!personId) return null
  const [row] = await db.select({ email: people.email, erasedAt: people.erasedAt }).from(people).where(eq(people.id, personId))
  return row && !row.erasedAt ? row.email : null
}
