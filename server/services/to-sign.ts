import { and, asc, eq, inArray, isNotNull, notExists, sql } from 'drizzle-orm'
import { type Gate, gates } from '../../shared/judging/gates'
import { secondNameReasons } from '../../shared/judging/names'
import { type HeldLevel, NOTHING_HELD } from '../../shared/judging/signer'
import type { SecondNameRow, ToSign, WaitingToSign } from '../../shared/types/judging'
import type { DbOrTx } from '../db/client'
import { judgements, signOffPieces, signOffs, standings } from '../db/schema/judging'
import { revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import type { Actor } from './actor'
import { compiledLesson } from './compiled'
import { piecesJudged } from './evidence'
import { gateFacts, heldBy, pairOf, tiesOf, todayOf } from './judging-facts'
import { currentNames, nameIn } from './names'

/** Judgements by this person that give a level and are not signed: the newest of each person and lesson. */
export async function unsigned(db: DbOrTx, who: Actor) {
  const rows = await db.select({ judgement: judgements, piece: pieces, title: revisions.title }).from(judgements)
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .innerJoin(revisions, and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId)))
    .where(and(eq(judgements.studioId, who.studioId), eq(judgements.by, who.personId), eq(judgements.as, 'instructor'), isNotNull(judgements.level), notExists(
      // Signed since, by whoever: this person's level in this lesson, at or above what was judged, or on this very judgement.
      db.select({ one: sql`1` }).from(signOffs).where(and(
        eq(signOffs.studioId, judgements.studioId), eq(signOffs.personId, pieces.personId), eq(signOffs.lessonId, pieces.lessonId),
        sql`${signOffs.at} >= ${judgements.at}`, sql`${signOffs.level} >= ${judgements.level}`, inArray(signOffs.kind, ['sign', 'refresh', 'founding']))))))
    .orderBy(asc(judgements.at), asc(judgements.id))
  return [...new Map(rows.map(row => [`${row.piece.personId} ${row.piece.lessonId}`, row])).values()]
}

/** Sign-offs from level 4 that stand on one signature. */
async function oneSignatures(db: DbOrTx, studioId: string) {
  return await db.select({ signOff: signOffs, title: revisions.title }).from(standings)
    .innerJoin(signOffs, and(eq(signOffs.studioId, standings.studioId), eq(signOffs.id, standings.signOffId)))
    .innerJoin(revisions, and(eq(revisions.studioId, signOffs.studioId), eq(revisions.id, signOffs.revisionId)))
    .where(and(eq(standings.studioId, studioId), eq(standings.oneSignature, true))).orderBy(asc(signOffs.at), asc(signOffs.id))
}

export interface LevelAsked { gate: Gate, judgements: string[] }

/** What stands in the way of a judged level now, and the judgements it rests on, its own first. */
export async function levelAsked(db: DbOrTx, who: Actor, piece: typeof pieces.$inferSelect, judgement: typeof judgements.$inferSelect, now: Date): Promise<LevelAsked | null> {
  const lesson = await compiledLesson(db, who.studioId, piece.revisionId)
  const judged = await piecesJudged(db, who.studioId, piece.personId, piece.lessonId)
  const facts = await gateFacts(db, who, piece.personId, piece.lessonId, lesson, now, judged)
  const own = judged.find(one => one.judgement.id === judgement.id)
  if (!own) return null
  // What was judged after it does not carry it.
  const before = judged.slice(0, judged.indexOf(own)).map(one => one.evidence)
  const gate = gates({ ...facts, before, piece: own.evidence }).find(one => one.level === judgement.level)
  if (!gate) return null
  const rests = judged.filter(one => gate.counts.includes(one.piece.id) && one !== own).map(one => one.judgement.id)
  return { gate, judgements: [judgement.id, ...rests] }
}

/** What this person has judged and not signed, and where a second name is awaited. */
export async function waitingToSign(db: DbOrTx, who: Actor, now: Date): Promise<WaitingToSign> {
  const rows = await unsigned(db, who)
  const names = await currentNames(db, rows.map(row => row.piece.personId))
  const items: ToSign[] = []
  for (const { judgement, piece, title } of rows) {
    const asked = await levelAsked(db, who, piece, judgement, now)
    if (!asked || judgement.level === null) continue
    items.push({
      judgement: judgement.id, judgements: asked.judgements, piece: piece.id, label: piece.label, maker: nameIn(names, piece.personId), lesson: title, level: judgement.level,
      judgedAt: judgement.at.toISOString(), gate: asked.gate, came: Math.max(0, piece.n - judgement.n - 1), n: piece.n, head: piece.head,
    })
  }
  return { items, secondNames: await secondNames(db, who, now) }
}

async function secondNames(db: DbOrTx, who: Actor, now: Date): Promise<SecondNameRow[]> {
  const rows = await oneSignatures(db, who.studioId)
  const names = await currentNames(db, rows.flatMap(row => [row.signOff.personId, row.signOff.by]))
  const today = await todayOf(db, who.studioId, now)
  const result: SecondNameRow[] = []
  for (const { signOff, title } of rows) {
    const pair = await pairOf(db, who, signOff.personId, signOff.lessonId, today)
    result.push({
      signOff: signOff.id, maker: nameIn(names, signOff.personId), lesson: title, level: signOff.level, by: nameIn(names, signOff.by), at: signOff.at.toISOString(),
      pieces: await piecesOf(db, who.studioId, signOff.id), reasons: secondNameReasons({ ...pair, signOff: { by: signOff.by, level: signOff.level, kind: signOff.kind, isInForce: true }, named: [] }),
    })
  }
  return result
}

async function piecesOf(db: DbOrTx, studioId: string, signOffId: string): Promise<{ id: string, label: string }[]> {
  return await db.select({ id: pieces.id, label: pieces.label }).from(signOffPieces)
    .innerJoin(judgements, and(eq(judgements.studioId, signOffPieces.studioId), eq(judgements.id, signOffPieces.judgementId)))
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .where(and(eq(signOffPieces.studioId, studioId), eq(signOffPieces.signOffId, signOffId))).orderBy(asc(judgements.at), asc(pieces.id))
}

/** How much waits for this person's name. */
export async function countToSign(db: DbOrTx, who: Actor, now: Date): Promise<{ toSign: number, secondNames: number }> {
  const rows = await oneSignatures(db, who.studioId)
  const [held, ties, { settings, today }] = [await heldBy(db, who.studioId, who.personId), await tiesOf(db, who.studioId, who.personId), await todayOf(db, who.studioId, now)]
  const lessonHeld = (lessonId: string): HeldLevel => held.get(lessonId) ?? NOTHING_HELD
  const mine = rows.filter(({ signOff }) => secondNameReasons({
    settings, today, tie: ties.get(signOff.personId) ?? null, maker: { personId: signOff.personId, name: '' },
    signer: { personId: who.personId, roles: who.roles, held: lessonHeld(signOff.lessonId) }, signOff: { by: signOff.by, level: signOff.level, kind: signOff.kind, isInForce: true }, named: [],
  }).length === 0)
  return { toSign: (await unsigned(db, who)).length, secondNames: mine.length }
}
