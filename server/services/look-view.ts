import { and, asc, count, desc, eq } from 'drizzle-orm'
import { stepOf, type SetOut } from '../../shared/bench/set-out'
import type { State } from '../../shared/bench/state'
import { againOf, faultsOf, linesOf } from '../../shared/judging/marks'
import { plainIn } from '../../shared/judging/plain'
import { maySign } from '../../shared/judging/signer'
import type { HistoryRow, JudgedAlready, LookView, MissRow, PhotoView, TurnTitle } from '../../shared/types/judging'
import type { Db } from '../db/client'
import { judgements, signOffPieces, signOffs } from '../db/schema/judging'
import { revisions } from '../db/schema/lessons'
import { photos, setAsideEvents } from '../db/schema/pieces'
import type { Actor } from './actor'
import { compiledLesson } from './compiled'
import { bareEvidence, type PieceJudged, piecesJudged, type PieceRow } from './evidence'
import { gateFacts } from './judging-facts'
import { foldRow } from './ledger'
import { currentNames, nameIn } from './names'
import { visiblePiece } from './piece-view'
import { refuse } from './refuse'
import { unsigned } from './to-sign'

/** Everything the judging page shows of a piece: lines with their evidence, photos, history, and what each level lacks. */
export async function lookView(db: Db, who: Actor, pieceId: string, now: Date): Promise<LookView> {
  const row = await visiblePiece(db, who, pieceId)
  const { set, state } = await foldRow(db, row, await compiledLesson(db, who.studioId, row.revisionId))
  if (!set) refuse(404, 'This piece has not begun.')
  const before = await piecesJudged(db, who.studioId, row.personId, row.lessonId)
  const facts = await gateFacts(db, who, row.personId, row.lessonId, set.lesson, now, before)
  const lines = linesOf(set, state)
  const kept = await photosOf(db, who.studioId, row, set, state)
  const names = await currentNames(db, [row.personId])
  return {
    now: now.toISOString(), piece: await pieceOf(db, row, set, state), maker: { id: row.personId, name: nameIn(names, row.personId) }, isOpen: row.status === 'finished',
    judged: await judgedAlready(db, who.studioId, row.id), mayYou: maySign(facts), lines, again: againOf(lines, row.head), facts, bare: bareEvidence(row, set, state),
    photos: kept, awaited: kept.filter(photo => photo.state === 'awaited').length,
    misses: missesOf(set, state), early: state.early.map(address => titleOf(set, address)), faultsSeen: [...new Set(state.faults.map(one => one.fault))], own: state.own,
    history: await historyOf(db, before.filter(one => one.piece.id !== row.id)),
    faults: faultsOf(set.lesson).map(({ key, sees, because, do: cure }) => ({ key, sees: plainIn(sees, set), because: plainIn(because, set), do: plainIn(cure, set) })),
    turns: turnTitles(set, state), late: state.late.length, setAside: await countSetAside(db, who.studioId, row.id), toSign: (await unsigned(db, who)).length,
  }
}

async function pieceOf(db: Db, row: PieceRow, set: SetOut, state: State): Promise<LookView['piece']> {
  const [revision] = await db.select({ number: revisions.number }).from(revisions).where(and(eq(revisions.studioId, row.studioId), eq(revisions.id, row.revisionId)))
  return {
    id: row.id, label: row.label, lesson: set.lesson.title, lessonId: row.lessonId, revision: revision?.number ?? 0, revisionId: row.revisionId, material: row.material, practice: row.practice,
    goods: row.goodsId !== null, left: set.start.left, mayMirror: set.lesson.objectMayMirror, setOf: set.lesson.piece, n: row.n, head: row.head, waitingSince: row.waitingSince?.toISOString() ?? null,
    finishedOn: row.finishedOn, minutes: Math.round(Object.values(state.spent).reduce((sum, ms) => sum + ms, 0) / 60_000), rounds: state.rounds + 1,
  }
}

/** "Close the loop, 2 of 3": the title of a step with its turn. */
export function titleOf(set: SetOut, address: string): string {
  const turn = set.turns[set.at.get(address) ?? -1]
  if (!turn) return address
  const title = plainIn(stepOf(set, turn).title, set)
  return turn.last > 1 ? `${title}, ${turn.turn} of ${turn.last}` : title
}

/** The steps that can be made again: each turn that is done. */
function turnTitles(set: SetOut, state: State): TurnTitle[] {
  return set.turns.filter(turn => state.done[turn.address] !== undefined).map(turn => ({ address: turn.address, title: titleOf(set, turn.address) }))
}

function missesOf(set: SetOut, state: State): MissRow[] {
  const addresses = new Set([...Object.keys(state.misses), ...Object.keys(state.released)])
  return [...addresses].map(address => ({ title: titleOf(set, address), count: state.misses[address] ?? 0, released: state.released[address] !== undefined }))
}

async function photosOf(db: Db, studioId: string, row: PieceRow, set: SetOut, state: State): Promise<PhotoView[]> {
  const rows = await db.select().from(photos).where(and(eq(photos.studioId, studioId), eq(photos.pieceId, row.id))).orderBy(asc(photos.id))
  const taken = new Map(state.photos.map(photo => [photo.id, photo.at]))
  const views = rows.map(photo => ({
    id: photo.id, turn: photo.turn, title: photo.turn ? titleOf(set, photo.turn) : 'The piece', for: photo.for, state: photo.state, at: taken.get(photo.id) ?? '', hasScale: photo.hasScale,
  }))
  // Taken in the order of the making; the tablet's clock is good enough for that.
  return views.sort((a, b) => a.at < b.at ? -1 : a.at > b.at ? 1 : 0)
}

async function countSetAside(db: Db, studioId: string, pieceId: string): Promise<number> {
  const [row] = await db.select({ count: count() }).from(setAsideEvents).where(and(eq(setAsideEvents.studioId, studioId), eq(setAsideEvents.pieceId, pieceId)))
  return row?.count ?? 0
}

async function judgedAlready(db: Db, studioId: string, pieceId: string): Promise<JudgedAlready | null> {
  const [last] = await db.select().from(judgements).where(and(eq(judgements.studioId, studioId), eq(judgements.pieceId, pieceId), eq(judgements.as, 'instructor'))).orderBy(desc(judgements.at), desc(judgements.id)).limit(1)
  if (!last) return null
  const [signed] = await db.select({ id: signOffs.id }).from(signOffPieces)
    .innerJoin(signOffs, and(eq(signOffs.studioId, signOffPieces.studioId), eq(signOffs.id, signOffPieces.signOffId)))
    .where(and(eq(signOffPieces.studioId, studioId), eq(signOffPieces.judgementId, last.id))).orderBy(asc(signOffs.at)).limit(1)
  const names = await currentNames(db, [last.by])
  return { id: last.id, by: nameIn(names, last.by), at: last.at.toISOString(), outcome: last.outcome, level: last.level, signedBy: signed?.id ?? null }
}

async function historyOf(db: Db, judged: readonly PieceJudged[]): Promise<HistoryRow[]> {
  const names = await currentNames(db, judged.map(one => one.judgement.by))
  return judged.map(({ piece, judgement, evidence }) => ({
    piece: piece.id, label: piece.label, day: evidence.day, outcome: judgement.outcome, seen: judgement.seen, by: nameIn(names, judgement.by), level: judgement.level, misses: evidence.misses,
  }))
}
