import { and, asc, eq, inArray } from 'drizzle-orm'
import { covered } from '../../shared/bench/scope'
import type { SetOut } from '../../shared/bench/set-out'
import type { State } from '../../shared/bench/state'
import type { PieceEvidence } from '../../shared/judging/evidence'
import { evidenceLines, type Marks } from '../../shared/judging/given'
import { linesOf } from '../../shared/judging/marks'
import type { DbOrTx } from '../db/client'
import { judgements, marks } from '../db/schema/judging'
import { pieces } from '../db/schema/pieces'
import { compiledLesson } from './compiled'
import { foldRow } from './ledger'

export type PieceRow = typeof pieces.$inferSelect
export type JudgementRow = typeof judgements.$inferSelect
export type MarkRow = typeof marks.$inferSelect

/** What a piece says for a level before anybody marked it. */
export function bareEvidence(row: Pick<PieceRow, 'id' | 'label' | 'finishedOn'>, set: SetOut, state: State): Omit<PieceEvidence, 'outcome' | 'seen' | 'lines'> {
  const isCovered = set.lesson.sizes.every((size) => {
    const told = set.start.sizes[size.name]
    return told === undefined || covered(size, told)
  })
  return { piece: row.id, label: row.label, day: row.finishedOn ?? '', covered: isCovered, misses: Math.max(0, ...Object.values(state.misses)) }
}

/** Rows of marks as they were given. */
export function marksGiven(rows: readonly MarkRow[]): Marks {
  return Object.fromEntries(rows.filter(row => row.says !== null || row.value !== null).map(row => [row.criterion, {
    ...row.says === null ? {} : { says: row.says }, ...row.value === null ? {} : { value: row.value }, ...row.rest ? { rest: true as const } : {},
  }]))
}

export interface PieceJudged { piece: PieceRow, judgement: JudgementRow, marks: MarkRow[], evidence: PieceEvidence }

/** The pieces of a person in a lesson with their newest judgement by an instructor, oldest judgement first. */
export async function piecesJudged(db: DbOrTx, studioId: string, personId: string, lessonId: string): Promise<PieceJudged[]> {
  const rows = await db.select({ piece: pieces, judgement: judgements }).from(judgements)
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .where(and(eq(judgements.studioId, studioId), eq(judgements.as, 'instructor'), eq(pieces.personId, personId), eq(pieces.lessonId, lessonId)))
    .orderBy(asc(judgements.at), asc(judgements.id))
  const newest = new Map(rows.map(row => [row.piece.id, row.judgement.id]))
  const kept = rows.filter(row => newest.get(row.piece.id) === row.judgement.id)
  const given = kept.length === 0 ? [] : await db.select().from(marks).where(and(eq(marks.studioId, studioId), inArray(marks.judgementId, kept.map(row => row.judgement.id))))
  const judged: PieceJudged[] = []
  for (const row of kept) {
    const own = given.filter(mark => mark.judgementId === row.judgement.id)
    const evidence = await evidenceOf(db, row.piece, row.judgement, own)
    if (evidence) judged.push({ ...row, marks: own, evidence })
  }
  return judged
}

async function evidenceOf(db: DbOrTx, row: PieceRow, judgement: JudgementRow, given: readonly MarkRow[]): Promise<PieceEvidence | null> {
  const { set, state } = await foldRow(db, row, await compiledLesson(db, row.studioId, row.revisionId))
  if (!set) return null
  return { ...bareEvidence(row, set, state), outcome: judgement.outcome, seen: judgement.seen, lines: evidenceLines(linesOf(set, state), marksGiven(given)) }
}
