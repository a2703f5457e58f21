/** What a judged piece says for a level. */
import type { Outcome, Says, Seen } from '../schemas/lists'
import type { JudgingSettings } from './settings'

export interface EvidenceLine {
  key: string
  says: string
  essential: boolean
  /** Seen while it is made, or not at all. */
  live: boolean
  /** A line a person judges, or one that is worked out from measures. */
  by: 'judge' | 'measure' | 'spread'
  said: Says | null
  /** Inside its tolerance, by level 0 to 5; null where nothing was measured. */
  inside: readonly (boolean | null)[]
}

export interface PieceEvidence {
  piece: string
  label: string
  /** The day it was finished, in the studio's zone. */
  day: string
  outcome: Outcome
  seen: Seen
  /** Sizes inside what the lesson covers. */
  covered: boolean
  /** The most wrong answers at one hold. */
  misses: number
  lines: readonly EvidenceLine[]
}

/** Yes, or inside at this level. */
export function isMet(line: EvidenceLine, level: number): boolean {
  return line.by === 'judge' ? line.said === 'yes' : line.inside[level] === true
}

/** Said "no", or outside at this level. */
export function isNo(line: EvidenceLine, level: number): boolean {
  return line.by === 'judge' ? line.said === 'no' : line.inside[level] === false
}

/** The essential lines that are not met at this level. */
export const unmet = (piece: PieceEvidence, level: number): EvidenceLine[] => piece.lines.filter(line => line.essential && !isMet(line, level))

/** A piece that says nothing for or against above level 2: outside the sizes, too many misses, seen on a photo only, or still being mended. */
export function isAside(piece: PieceEvidence, settings: JudgingSettings): boolean {
  return !piece.covered || piece.misses >= settings.missesSpoil || piece.seen === 'photo' || piece.outcome === 'mend'
}

/** Does the piece count towards this level? */
export function countsFor(piece: PieceEvidence, level: number, settings: JudgingSettings): boolean {
  if (piece.outcome !== 'kept') return false
  return level <= 2 || (!isAside(piece, settings) && unmet(piece, level).length === 0)
}
