/**
 * What a signed level is worth today. Lapse is never stored.
 * Chosen: at its date a level drops by one (5 to 4, 4 to 3, 3 to 2), once, and stays there until it is signed again.
 * Levels 1 and 2 do not lapse: at those an instructor is beside the person anyway.
 */
import { addDays, daysBetween } from './days'
import type { JudgingSettings } from './settings'

/** What lapse reads of a standing. */
export interface SignedRow {
  levelSigned: number
  /** The last day in an unbroken run of work since the sign-off. */
  aliveOn: string | null
  /** Days the level lives without practice. */
  keeps: number | null
}

export type LapseState = 'held' | 'refresh-due' | 'lapsed'
export interface Lapsed {
  /** The level that holds today. */
  level: number
  state: LapseState
  /** The day it drops, or dropped; null where it never does. */
  until: string | null
}

/** The level held on a day (of the studio's zone). The day of `until` itself is already too late. */
export function lapse(row: SignedRow, settings: Pick<JudgingSettings, 'refreshDays' | 'usualKeeps'>, today: string): Lapsed {
  if (row.levelSigned < 3 || row.aliveOn === null) return { level: row.levelSigned, state: 'held', until: null }
  const until = addDays(row.aliveOn, row.keeps ?? settings.usualKeeps)
  const left = daysBetween(today, until)
  if (left <= 0) return { level: row.levelSigned - 1, state: 'lapsed', until }
  return { level: row.levelSigned, state: left <= settings.refreshDays ? 'refresh-due' : 'held', until }
}
