import { and, eq, inArray } from 'drizzle-orm'
import { canonical } from '../../shared/lesson/canonical'
import type { BatchSchema, BenchEvent, EventOf} from '../../shared/bench/events';
import { EVENT_KINDS, EVENT_VERSION, HeadSchema, readEvent, shaOfEvent } from '../../shared/bench/events'
import type { z } from 'zod'
import { inTransaction } from '../db/transaction'
import type { Db, Tx } from '../db/client'
import { pieceEvents, pieces, setAsideEvents } from '../db/schema/pieces'
import type { Actor } from './actor'
import { labelFor } from './labels'
import { lastSeq, type Ledger, newLedger, openLedger, write } from './ledger'
import { stopForStudio } from './piece-acts'
import { refuse } from './refuse'
import { settle } from './settle'
import { checkStart } from './start-check'

export type Batch = z.infer<typeof BatchSchema>
export interface Refused { id: string, reason: string, says: string, expected?: number }
export interface TakenIn { status: 200 | 409 | 422, n: number, head: string, taken: { id: string, n: number, late: boolean }[], already: { id: string, n: number }[], refused: Refused | null }

interface Taking { tx: Tx, who: Actor, pieceId: string, batch: Batch, now: Date, clockOffMs: number, ledger: Ledger | null, out: TakenIn }

/**
 * Takes a batch of one tablet's events in, in order, in one transaction. What came before a refused event stands; the
 * refused one is set aside and the batch ends there. 403 when any event is another person's: then nothing is stored.
 */
export async function takeIn(db: Db, who: Actor, pieceId: string, batch: Batch, now: Date): Promise<TakenIn> {
  if (batch.events.some(raw => !isOwn(raw, who, pieceId, batch.tablet))) refuse(403, 'These acts are not all yours, of this piece and of this tablet.')
  return await inTransaction(db, async (tx) => {
    const taking: Taking = {
      tx, who, pieceId, batch, now, clockOffMs: now.getTime() - new Date(batch.sentAt).getTime(), ledger: await openLedger(tx, who.studioId, pieceId),
      out: { status: 200, n: 0, head: '', taken: [], already: [], refused: null },
    }
    if (taking.ledger && taking.ledger.row.personId !== who.personId) refuse(404, 'There is nothing here, or it is not yours to see.')
    const known = await knownEvents(taking)
    for (const raw of batch.events) {
      if (!await takeOne(taking, raw, known)) break
    }
    if (taking.ledger && taking.ledger.added.length > 0) await settle(tx, taking.ledger, taking.clockOffMs, now)
    taking.out.n = taking.ledger?.row.n ?? 0
    taking.out.head = taking.ledger?.row.head ?? ''
    return taking.out
  })
}

function isOwn(raw: unknown, who: Actor, pieceId: string, tablet: string): boolean {
  const head = HeadSchema.safeParse(raw)
  return head.success && head.data.actor === who.personId && head.data.piece === pieceId && head.data.tablet === tablet
}

interface Known { stored: Map<string, { n: number, sha: string }>, aside: Map<string, string>, next: number }

/** What is there already of this batch, and the seq that comes next: what was set aside has used its number too. */
async function knownEvents({ tx, who, pieceId, batch }: Taking): Promise<Known> {
  const ids = batch.events.map(raw => HeadSchema.parse(raw).id)
  const stored = await tx.select({ id: pieceEvents.id, n: pieceEvents.n, sha: pieceEvents.sha, piece: pieceEvents.pieceId }).from(pieceEvents)
    .where(and(eq(pieceEvents.studioId, who.studioId), inArray(pieceEvents.id, ids)))
  if (stored.some(row => row.piece !== pieceId)) refuse(403, 'These acts are not all yours, of this piece and of this tablet.')
  const aside = await tx.select({ id: setAsideEvents.id, reason: setAsideEvents.reason }).from(setAsideEvents)
    .where(and(eq(setAsideEvents.studioId, who.studioId), inArray(setAsideEvents.id, ids)))
  const last = await lastSeq(tx, who.studioId, pieceId, batch.tablet)
  return { stored: new Map(stored.map(row => [row.id, row])), aside: new Map(aside.map(row => [row.id, row.reason])), next: last + 1 }
}

/** Takes one event. False ends the batch. */
async function takeOne(taking: Taking, raw: unknown, known: Known): Promise<boolean> {
  const head = HeadSchema.parse(raw)
  const event = readEvent(raw)
  const stored = known.stored.get(head.id)
  if (stored) {
    if (!event || shaOfEvent(event) !== stored.sha) return end(taking, 409, { id: head.id, reason: 'changed', says: 'This act was sent before with other content. The first one stands.' })
    taking.out.already.push({ id: head.id, n: stored.n })
    return true
  }
  const aside = known.aside.get(head.id)
  if (aside) return end(taking, 422, { id: head.id, reason: aside, says: 'This act was set aside before.' })
  if (head.seq !== known.next) return end(taking, 409, { id: head.id, reason: 'seq', says: 'Acts before this one have not arrived.', expected: known.next })
  if (!event) return await setAside(taking, raw, isNewer(head) ? 'newer' : 'unreadable', isNewer(head) ? 'This tablet runs a newer application than the studio.' : 'This act cannot be read.')
  const verdict = event.kind === 'piece.started' && !taking.ledger ? await begin(taking, event) : goOn(taking, event)
  if (verdict) return await setAside(taking, raw, verdict.reason, verdict.says)
  known.next++
  const added = taking.ledger?.added.find(one => one.id === event.id)
  if (added) taking.out.taken.push({ id: added.id, n: added.n, late: added.late })
  return true
}

const isNewer = (head: z.infer<typeof HeadSchema>): boolean => head.v > EVENT_VERSION || !(EVENT_KINDS as readonly string[]).includes(head.kind)

function goOn(taking: Taking, event: BenchEvent): { reason: string, says: string } | null {
  if (!taking.ledger) return { reason: 'unknown-piece', says: 'This piece is not known here yet.' }
  const verdict = write(taking.ledger, { event, receivedAt: taking.now, clockOffMs: taking.clockOffMs }, { instructor: taking.who.roles.includes('instructor') })
  return verdict.ok ? null : verdict
}

async function begin(taking: Taking, event: EventOf<'piece.started'>): Promise<{ reason: string, says: string } | null> {
  const { tx, who, pieceId, now } = taking
  const found = await checkStart(tx, who, event.body)
  if ('reason' in found) return found
  if (event.round !== event.id) return { reason: 'unreadable', says: 'This act cannot be read.' }
  const { lesson, revision, practice, material, goods } = event.body
  taking.ledger = await newLedger(tx, {
    studioId: who.studioId, id: pieceId, personId: who.personId, lessonId: lesson, revisionId: revision, label: await labelFor(tx, who, lesson), status: 'at-bench', round: event.id,
    place: found.turns[0]?.address ?? null, turnsDone: 0, turnsAll: found.turns.length, practice, material, goodsId: goods,
    startedAt: new Date(Math.min(new Date(event.at).getTime() + taking.clockOffMs, now.getTime())), finishedAt: null, finishedOn: null, waitingSince: null,
  }, found.lesson)
  const refused = goOn(taking, event)
  if (!refused && found.stoppedBy && found.stoppedBy !== who.personId) await stopForStudio(tx, taking.ledger, found.stoppedBy, now)
  return refused
}

async function setAside(taking: Taking, raw: unknown, reason: string, says: string): Promise<false> {
  const { tx, who, pieceId, batch, now } = taking
  const head = HeadSchema.parse(raw)
  await tx.insert(setAsideEvents).values({ studioId: who.studioId, id: head.id, pieceId, tablet: batch.tablet, seq: head.seq, reason, body: canonical(raw), receivedAt: now })
  return end(taking, 422, { id: head.id, reason, says })
}

function end(taking: Taking, status: 409 | 422, refused: Refused): false {
  taking.out.status = status
  taking.out.refused = refused
  return false
}

/** The piece's row of this studio, or null. */
export async function pieceRow(db: Db | Tx, studioId: string, pieceId: string) {
  const [row] = await db.select().from(pieces).where(and(eq(pieces.studioId, studioId), eq(pieces.id, pieceId)))
  return row ?? null
}
