import { and, eq } from 'drizzle-orm'
import { isError } from 'h3'
import { dayIn } from '../../shared/bench/day'
import { type Reason, standsAt, NOTHING_HELD } from '../../shared/judging/signer'
import type { SignItem } from '../../shared/schemas/judging'
import type { SignOffKind } from '../../shared/schemas/lists'
import type { SignResult } from '../../shared/types/judging'
import type { Db, DbOrTx, Tx } from '../db/client'
import { judgements, signOffPieces, signOffs } from '../db/schema/judging'
import { revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import { memberships } from '../db/schema/studio'
import { inTransaction, isDuplicate } from '../db/transaction'
import type { Actor } from './actor'
import { digestOf } from './digest'
import { heldBy, todayOf } from './judging-facts'
import { queueMail } from './mail'
import { currentNames } from './names'
import { found, refuse } from './refuse'
import { append } from './register'
import { refreshStanding, zoneOf } from './standings'
import { levelAsked } from './to-sign'
import { keepWords } from './words'

export type SignOffRow = typeof signOffs.$inferSelect

/** Signs each item by itself, in a transaction of its own: one that may not be signed keeps none of the others back. */
export async function signAll(db: Db, who: Actor, items: readonly SignItem[], now: Date): Promise<SignResult[]> {
  const results: SignResult[] = []
  for (const item of items) results.push(await signOne(db, who, item, now))
  return results
}

async function signOne(db: Db, who: Actor, item: SignItem, now: Date): Promise<SignResult> {
  try {
    const { row, needsSecondName } = await onlyOnce(db, who, item.id, tx => signIn(tx, who, item, now))
    return { id: row.id, ok: true, level: row.level, needsSecondName }
  }
  catch (error) {
    if (!isError<{ reasons?: Reason[] }>(error) || error.statusCode >= 500) throw error
    return { id: item.id, ok: false, statusCode: error.statusCode, says: error.message, reasons: error.data?.reasons ?? [] }
  }
}

export interface SignedOnce { row: SignOffRow, needsSecondName: boolean, isNew: boolean }

/** A sign-off of an id that is there already is the same act: answered with the same row, whoever was first. */
export async function onlyOnce(db: Db, who: Actor, id: string, work: (tx: Tx) => Promise<SignedOnce>): Promise<SignedOnce> {
  try {
    const there = await ownSignOff(db, who, id)
    return there ?? await inTransaction(db, work)
  }
  catch (error) {
    if (!isDuplicate(error)) throw error
    return await ownSignOff(db, who, id) ?? refuse(409, 'This was signed a moment ago. Look again.')
  }
}

/** The sign-off of this id, when this person made it before; asked again once the lock is held. */
export async function ownSignOff(db: DbOrTx, who: Actor, id: string): Promise<SignedOnce | null> {
  const [row] = await db.select().from(signOffs).where(and(eq(signOffs.studioId, who.studioId), eq(signOffs.id, id)))
  if (!row) return null
  if (row.by !== who.personId) refuse(409, 'This was signed by another person. Look again.')
  return { row, needsSecondName: row.level >= 4 && row.kind === 'sign', isNew: false }
}

/** One person's levels change one at a time: the gate is asked with this lock held. */
export async function lockPerson(tx: Tx, studioId: string, personId: string): Promise<void> {
  const [row] = await tx.select({ id: memberships.id }).from(memberships).where(and(eq(memberships.studioId, studioId), eq(memberships.personId, personId))).for('update')
  found(row)
}

async function signIn(tx: Tx, who: Actor, item: SignItem, now: Date): Promise<SignedOnce> {
  const [first] = item.judgements
  const [about] = await tx.select({ personId: pieces.personId }).from(judgements)
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .where(and(eq(judgements.studioId, who.studioId), eq(judgements.id, first ?? ''), eq(judgements.by, who.personId)))
  await lockPerson(tx, who.studioId, found(about).personId)
  const there = await ownSignOff(tx, who, item.id)
  if (there) return there
  const [row] = await tx.select({ judgement: judgements, piece: pieces, title: revisions.title }).from(judgements)
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .innerJoin(revisions, and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId)))
    .where(and(eq(judgements.studioId, who.studioId), eq(judgements.id, first ?? '')))
  const { judgement, piece, title } = found(row)
  if (judgement.level !== item.level) refuse(409, 'Another level was judged. Look again.')
  if (piece.n !== item.n || piece.head !== item.head) refuse(409, `${Math.max(1, piece.n - item.n)} more ${piece.n - item.n > 1 ? 'things' : 'thing'} came in. Look again.`)
  const asked = found(await levelAsked(tx, who, piece, judgement, now))
  if (!asked.gate.may) refuse(422, asked.gate.reasons[0]?.says ?? '', { reasons: asked.gate.reasons })
  if (asked.judgements.length !== item.judgements.length || asked.judgements.some(id => !item.judgements.includes(id))) refuse(409, 'It rests on other pieces now. Look again.')
  if (item.level === 5 && item.words === '') refuse(422, 'Say what you saw this person teach, and which pieces they judged as you did.', { reasons: [] })
  await queueMail(tx, { studioId: who.studioId, toPerson: piece.personId, kind: 'signed', body: { lesson: title, level: item.level, by: who.personId, secondName: asked.gate.needsSecondName }, dedupeKey: `signed ${item.id}` }, now)
  const signed = await writeSignOff(tx, who, {
    id: item.id, of: item.id, kind: asked.gate.isRefresh ? 'refresh' : 'sign', personId: piece.personId, lessonId: piece.lessonId, revisionId: piece.revisionId, level: item.level,
    byLevel: judgement.signerLevel, judgements: asked.judgements, words: item.words,
  }, now)
  return { row: signed, needsSecondName: asked.gate.needsSecondName, isNew: true }
}

export interface NewSignOff {
  id: string
  of: string
  kind: SignOffKind
  personId: string
  lessonId: string
  revisionId: string
  level: number
  byLevel: number
  judgements: readonly string[]
  words: string
}

/** The sign-off, the pieces it rests on, the standing, and last of all the register. */
export async function writeSignOff(tx: Tx, who: Actor, given: NewSignOff, now: Date): Promise<SignOffRow> {
  const { studioId } = who
  const names = await currentNames(tx, [given.personId, who.personId])
  const words = given.words === '' ? null : await keepWords(tx, who, given.words, now)
  const row: SignOffRow = {
    studioId, id: given.id, personId: given.personId, personNameVersion: names.get(given.personId)?.version ?? 0, lessonId: given.lessonId, revisionId: given.revisionId, level: given.level,
    kind: given.kind, of: given.of, by: who.personId, byNameVersion: names.get(who.personId)?.version ?? 0, byLevel: given.byLevel, at: now, onDay: dayIn(await zoneOf(tx, studioId), now),
    digest: await digestOf(tx, studioId, given.judgements), wordsId: words?.id ?? null,
  }
  await tx.insert(signOffs).values(row)
  if (given.judgements.length > 0) await tx.insert(signOffPieces).values(given.judgements.map(judgementId => ({ studioId, signOffId: given.id, judgementId })))
  await refreshStanding(tx, studioId, given.personId, given.lessonId)
  await append(tx, who, {
    act: given.kind, objectKind: 'sign-off', objectId: given.id, at: now,
    body: {
      person: given.personId, lesson: given.lessonId, revision: given.revisionId, level: given.level, of: given.of, byLevel: given.byLevel, digest: row.digest, judgements: [...given.judgements],
      words: words?.hash ?? null, self: given.personId === who.personId,
    },
  })
  return row
}

/** The level a signer stands at today in a lesson, as it is written beside their name. */
export async function standingLevel(db: DbOrTx, who: Actor, lessonId: string, now: Date): Promise<number> {
  const { settings, today } = await todayOf(db, who.studioId, now)
  const held = await heldBy(db, who.studioId, who.personId, [lessonId])
  return standsAt(held.get(lessonId) ?? NOTHING_HELD, settings, today)
}
