import { and, asc, eq, inArray, lte, sql } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { MailKind } from '../../shared/schemas/lists'
import type { LetterRow } from '../../shared/types/entry'
import type { Db, Tx } from '../db/client'
import { mail, people } from '../db/schema/people'
import { inTransaction } from '../db/transaction'
import { type Letter, letterOf } from './letters'
import { namesOf } from './names'
import { found } from './refuse'

export interface QueuedMail { studioId: string | null, toPerson?: string, toAddress?: string, kind: MailKind, body: Record<string, string | number | boolean | null>, dedupeKey: string }

/** Puts a letter in the queue, in the transaction of the act it tells of. The same key twice is one letter. */
export async function queueMail(tx: Tx, letter: QueuedMail, now: Date): Promise<void> {
  if ((letter.toPerson === undefined) === (letter.toAddress === undefined)) throw new Error('A letter goes to a person or to an address.')
  await tx.insert(mail).values({
    id: ulid(now.getTime()), studioId: letter.studioId, toPerson: letter.toPerson ?? null, toAddress: letter.toAddress ?? null, kind: letter.kind, body: letter.body, nextAt: now, dedupeKey: letter.dedupeKey,
  }).onDuplicateKeyUpdate({ set: { dedupeKey: sql`dedupe_key` } })
}

export interface Post { send: (letter: Letter & { to: string, messageId: string }) => Promise<unknown>, publicUrl: string }

const MOST_TRIES = 8
const AT_ONCE = 20

/** Sends all that is due, however much it is. A letter that cannot be sent waits longer each time, and is given up, visibly, after eight tries. */
export async function sendWaiting(db: Db, post: Post, now: Date): Promise<number> {
  let sent = 0
  for (;;) {
    const rows = await claim(db, now)
    if (rows.length === 0) return sent
    sent += await sendRows(db, rows, post, now)
  }
}

async function sendRows(db: Db, rows: Awaited<ReturnType<typeof claim>>, post: Post, now: Date): Promise<number> {
  let sent = 0
  for (const row of rows) {
    try {
      const to = row.toAddress ?? await addressOf(db, row.toPerson)
      const letter = to ? await letterOf(db, row, post.publicUrl, now) : null
      // Nobody to write to any more, or a link that is used up: there is no letter.
      if (!to || !letter) {
        await db.delete(mail).where(eq(mail.id, row.id))
        continue
      }
      await post.send({ to, messageId: `<${row.id}@${new URL(post.publicUrl).hostname}>`, ...letter })
      await db.update(mail).set({ state: 'sent', sentAt: now, toAddress: null, body: {} }).where(eq(mail.id, row.id))
      sent++
    }
    catch (error) {
      await waitLonger(db, row, error, now)
    }
  }
  return sent
}

async function waitLonger(db: Db, row: { id: string, kind: string, tries: number }, error: unknown, now: Date): Promise<void> {
  const tries = row.tries + 1
  const isLast = tries >= MOST_TRIES
  await db.update(mail).set({ state: isLast ? 'given-up' : 'waits', tries, nextAt: new Date(now.getTime() + waitAfter(tries)) }).where(eq(mail.id, row.id))
  // The reason is the other server's word; the address and the letter stay out of the log.
  console.error(`A letter (${row.kind}, ${row.id}) ${isLast ? 'was given up' : 'waits'} after ${tries} ${tries === 1 ? 'try' : 'tries'}: ${error instanceof Error ? error.name : 'unknown'}`)
}

/** Two minutes, four, eight ... at most about four hours. */
export const waitAfter = (tries: number): number => 60_000 * 2 ** Math.min(tries, 8)

/** The letters of a studio that could not be sent. */
export async function givenUp(db: Db, studioId: string): Promise<LetterRow[]> {
  const rows = await db.select().from(mail).where(and(eq(mail.studioId, studioId), eq(mail.state, 'given-up'))).orderBy(asc(mail.id))
  const names = await namesOf(db, rows.flatMap(row => row.toPerson ?? []))
  return rows.map(({ id, kind, toPerson, toAddress, tries }) => ({ id, kind, to: toAddress ?? names.get(toPerson ?? '') ?? '', tries }))
}

/** Puts a letter that was given up into the queue again. */
export async function sendAgain(db: Db, studioId: string, id: string, now: Date): Promise<void> {
  const mine = and(eq(mail.studioId, studioId), eq(mail.id, id))
  const [row] = await db.select({ state: mail.state }).from(mail).where(mine)
  if (found(row).state === 'given-up') await db.update(mail).set({ state: 'waits', tries: 0, nextAt: now }).where(and(mine, eq(mail.state, 'given-up')))
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
