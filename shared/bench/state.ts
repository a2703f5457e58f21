/** Where a piece stands, as plain data: it is kept as JSON beside the piece, and may be thrown away. */
import type { Answer, Bodies, PieceStarted } from './events'
import type { Outcome, PieceStatus, Says } from '../schemas/lists'

/** Goes up when a fold of the same events may come out otherwise; a kept state of another number is folded anew. */
export const MACHINE = 1

export interface TakenReading { id: string, round: string, turn: string | null, reading: string, values: string[], typed: string[], unit: string, gauge: string, right: boolean, at: string }
export interface TakenPhoto { id: string, round: string, turn: string | null, for: Bodies['photo.taken']['for'], event: string, at: string }
export interface GivenAnswer { id: string, turn: string, ask: number, answer: Answer, right: boolean, round: string, at: string }

export interface State {
  piece: string
  status: PieceStatus | 'none'
  maker: string
  start: PieceStarted | null
  startedAt: string | null
  finishedAt: string | null
  round: string
  rounds: number
  /** Address -> id of the event that did it, in this round. */
  done: Record<string, string>
  /** `turn#ask` answered right in this round. */
  right: Record<string, true>
  /** `turn#check` answered in this round: the choice. */
  checked: Record<string, { choice: string, right: boolean }>
  /** Turn -> who looked. */
  witnessed: Record<string, { by: string, how: string }>
  /** Turn -> who let it go, and the words. */
  released: Record<string, { by: string, words: string }>
  /** Wrong answers at a turn's hold, over all rounds. */
  misses: Record<string, number>
  answers: GivenAnswer[]
  readings: TakenReading[]
  photos: TakenPhoto[]
  /** `turn#wait` -> until. */
  waits: Record<string, string>
  /** Turns gone on from before a wait was over. */
  early: string[]
  faults: { turn: string | null, fault: string }[]
  remade: { turn: string, why: string, at: string }[]
  closing: string[]
  own: Record<string, Says>
  look: { event: string, turn: string | null, about: string, at: string } | null
  stopped: { why: string, words: string | null } | null
  judged: { judgement: string, outcome: Outcome } | null
  putAway: { why: string, words: string | null, at: string } | null
  /** The last sitting that was opened: by which tablet, on what way, and when. */
  sitting: { tablet: string, way: string, at: string } | null
  /** First turn of the plan that is not done; null when all is done. */
  place: string | null
  turnsDone: number
  /** Milliseconds at each turn, gaps over ten minutes left out. */
  spent: Record<string, number>
  /** Ids of events kept but of no effect. */
  late: string[]
  whileStopped: string[]
}

export function emptyState(piece: string): State {
  return {
    piece, status: 'none', maker: '', start: null, startedAt: null, finishedAt: null, round: '', rounds: 0, done: {}, right: {}, checked: {}, witnessed: {}, released: {},
    misses: {}, answers: [], readings: [], photos: [], waits: {}, early: [], faults: [], remade: [], closing: [], own: {}, look: null, stopped: null, judged: null,
    putAway: null, sitting: null, place: null, turnsDone: 0, spent: {}, late: [], whileStopped: [],
  }
}
