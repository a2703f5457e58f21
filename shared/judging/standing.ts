/** Where one person stands with one lesson, folded from what is on record. Nothing here depends on the day it is asked. */
import type { Outcome, PieceStatus, SignOffKind } from '../schemas/lists'
import { addDays } from './days'

export interface SignFact {
  id: string
  /** The sign-off it stands beside; its own id for one that stands alone. */
  of: string
  kind: SignOffKind
  level: number
  at: Date
  day: string
  /** Days the level lives, by the revision it was signed under and the settings of that day. */
  keeps: number
}
export interface PieceFact { id: string, status: PieceStatus, startedAt: Date, finishedOn: string | null, waitingSince: Date | null, turnsDone: number, turnsAll: number }
export interface JudgedFact { id: string, outcome: Outcome, at: Date, day: string }
export interface StandingFacts {
  signs: readonly SignFact[]
  pieces: readonly PieceFact[]
  judged: readonly JudgedFact[]
  /** Days on which the person judged another's piece of this lesson: teaching counts as doing. */
  taught: readonly string[]
  revisionRead: string | null
}
export interface Standing {
  levelSigned: number
  oneSignature: boolean
  signedOn: string | null
  signOffId: string | null
  lastPieceOn: string | null
  aliveOn: string | null
  keeps: number | null
  pieces: number
  openPiece: string | null
  placeNo: number | null
  places: number | null
  waitingSince: Date | null
  sentBackOn: string | null
  revisionRead: string | null
  flags: string[]
}

const GIVES = new Set<SignOffKind>(['sign', 'refresh', 'founding'])
const byTime = (a: { at: Date, id: string }, b: { at: Date, id: string }): number => a.at.getTime() - b.at.getTime() || (a.id < b.id ? -1 : 1)

export interface InForce { sign: SignFact, level: number, oneSignature: boolean }

/**
 * The sign-off in force: the last that gives a level, as corrected (a correction to 0 takes it out). From level 4 it
 * stands on one signature until some sign-off of that level has its second name; a founding level needs none.
 */
export function inForce(signs: readonly SignFact[]): InForce | null {
  const inOrder = [...signs].sort(byTime)
  const corrected = new Map(inOrder.filter(sign => sign.kind === 'correction').map(sign => [sign.of, sign.level]))
  const levelOf = (sign: SignFact): number => corrected.get(sign.id) ?? sign.level
  const giving = inOrder.filter(sign => GIVES.has(sign.kind) && levelOf(sign) > 0)
  const sign = giving.at(-1)
  if (!sign) return null
  const level = levelOf(sign)
  const named = new Set(inOrder.filter(one => one.kind === 'countersign').map(one => one.of))
  const isWhole = level < 4 || giving.some(one => levelOf(one) === level && (one.kind === 'founding' || named.has(one.id)))
  return { sign, level, oneSignature: !isWhole }
}

/** The last day of a run that starts at `from` and in which no two days of work are further apart than the level lives. */
export function aliveUntil(from: string, days: readonly string[], keeps: number): string {
  let alive = from
  for (const day of [...days].sort()) {
    if (day <= alive) continue
    if (day >= addDays(alive, keeps)) break
    alive = day
  }
  return alive
}

/** Nothing on record: such a standing has no row. */
export const isBlank = (standing: Standing): boolean =>
  standing.levelSigned === 0 && standing.pieces === 0 && standing.openPiece === null && standing.revisionRead === null && standing.sentBackOn === null

/** Folds a standing. The same facts in any order give the same. */
export function standingOf(facts: StandingFacts): Standing {
  const made = facts.pieces.filter(piece => piece.status === 'finished' || piece.status === 'judged')
  const days = made.flatMap(piece => piece.finishedOn ?? [])
  const open = facts.pieces.filter(piece => piece.status === 'at-bench').sort((a, b) => a.startedAt.getTime() - b.startedAt.getTime() || (a.id < b.id ? -1 : 1)).at(-1)
  const waiting = facts.pieces.flatMap(piece => piece.status === 'finished' && piece.waitingSince ? [piece.waitingSince.getTime()] : [])
  const lastJudged = [...facts.judged].sort(byTime).at(-1)
  const force = inForce(facts.signs)
  return {
    levelSigned: force?.level ?? 0,
    oneSignature: force?.oneSignature ?? false,
    signedOn: force?.sign.day ?? null,
    signOffId: force?.sign.id ?? null,
    lastPieceOn: [...days].sort().at(-1) ?? null,
    aliveOn: force ? aliveUntil(force.sign.day, force.level === 5 ? [...days, ...facts.taught] : days, force.sign.keeps) : null,
    keeps: force?.sign.keeps ?? null,
    pieces: made.length,
    openPiece: open?.id ?? null,
    placeNo: open ? Math.min(open.turnsDone + 1, open.turnsAll) : null,
    places: open?.turnsAll ?? null,
    waitingSince: waiting.length > 0 ? new Date(Math.min(...waiting)) : null,
    sentBackOn: lastJudged?.outcome === 'sent-back' ? lastJudged.day : null,
    revisionRead: facts.revisionRead,
    flags: force?.sign.kind === 'founding' ? ['founding'] : [],
  }
}
