/** The class progress table: what each cell shows and says, and the tallies over it. */
import { daysBetween } from './days'
import { lapse, type Lapsed } from './lapse'
import { levelWords } from './levels'
import type { JudgingSettings } from './settings'

export const CELL_GLYPHS = ['bare', 'at', 'waits', 'back', 'signed', 'once', 'lapsed', 'due', 'closed'] as const
export type CellGlyph = (typeof CELL_GLYPHS)[number]

/** What is on record of one person and lesson, as the table reads it. Days are of the studio's zone. */
export interface CellFacts {
  levelSigned: number
  oneSignature: boolean
  aliveOn: string | null
  keeps: number | null
  openPiece: string | null
  placeNo: number | null
  places: number | null
  /** Day since when a piece waits. */
  waitingOn: string | null
  sentBackOn: string | null
}
export interface Cell {
  person: string
  lesson: string
  glyph: CellGlyph
  /** The level it holds today; null where there is none. */
  level: number | null
  /** What goes on besides the level. */
  also: { glyph: Extract<CellGlyph, 'at' | 'waits' | 'back'>, says: string } | null
  /** Days a piece has waited. */
  waits: number | null
  /** The whole cell in words. */
  says: string
}
export interface TableRow { id: string, name: string, lastAt: string | null, cells: Cell[] }
export interface TableColumn { id: string, slug: string, title: string }

const days = (n: number): string => n === 0 ? 'today' : n === 1 ? '1 day' : `${n} days`

/** A cell. `isClosed`: not open to this person's age or permissions. */
export function cellOf(of: { person: string, lesson: string }, facts: CellFacts | null, isClosed: boolean, settings: JudgingSettings, today: string): Cell {
  const held = facts ? lapse(facts, settings, today) : null
  const also = facts ? goingOn(facts, today) : null
  const waits = facts?.waitingOn ? daysBetween(facts.waitingOn, today) : null
  const base = { ...of, waits }
  if (held && held.level > 0 && facts) {
    return { ...base, glyph: oliveOf(held, facts), level: held.level, also: also ?? null, says: [saysOfLevel(held, facts, today), also?.says].filter(Boolean).join('; ') }
  }
  if (also) return { ...base, glyph: also.glyph, level: null, also: null, says: also.says }
  if (isClosed) return { ...base, glyph: 'closed', level: null, also: null, says: 'not open yet' }
  return { ...base, glyph: 'bare', level: null, also: null, says: 'not begun' }
}

function oliveOf(held: Lapsed, facts: CellFacts): CellGlyph {
  if (held.state === 'lapsed') return 'lapsed'
  if (facts.oneSignature) return 'once'
  return held.state === 'refresh-due' ? 'due' : 'signed'
}

function saysOfLevel(held: Lapsed, facts: CellFacts, today: string): string {
  if (held.state === 'lapsed') return `lapsed to ${levelWords(held.level)}`
  const level = `${levelWords(held.level)}${facts.oneSignature ? ', one signature' : ''}`
  if (held.state !== 'refresh-due' || held.until === null) return level
  const left = daysBetween(today, held.until)
  return `${level}; refresh due in ${days(left)}`
}

/** The one thing that goes on with a lesson besides the level: a piece that waits before one on the bench, that before one sent back. */
function goingOn(facts: CellFacts, today: string): Cell['also'] {
  if (facts.waitingOn) { const waited = daysBetween(facts.waitingOn, today); return { glyph: 'waits', says: `a piece waits for a look ${waited === 0 ? 'since today' : days(waited)}` } }
  if (facts.openPiece) return { glyph: 'at', says: `at the bench, step ${facts.placeNo ?? '?'} of ${facts.places ?? '?'}` }
  return facts.sentBackOn ? { glyph: 'back', says: `a piece sent back ${days(daysBetween(facts.sentBackOn, today))} ago`.replace('today ago', 'today') } : null
}

export interface Tally { key: 'waiting' | 'away' | 'three', says: string, /** Cells (`person lesson`) or people it is about. */ cells: string[], people: string[] }
const AWAY_DAYS = 14

/** The tallies as sentences. What is not open stays out of every one. */
export function talliesOf(rows: readonly TableRow[], today: string): Tally[] {
  const cells = rows.flatMap(row => row.cells).filter(cell => cell.glyph !== 'closed')
  const key = (cell: Cell) => `${cell.person} ${cell.lesson}`
  const waiting = cells.filter(cell => cell.waits !== null)
  const oldest = Math.max(0, ...waiting.map(cell => cell.waits ?? 0))
  const away = rows.filter(row => row.lastAt === null || daysBetween(row.lastAt, today) >= AWAY_DAYS)
  const three = cells.filter(cell => (cell.level ?? 0) >= 3)
  const tallies: Tally[] = []
  if (waiting.length > 0) tallies.push({ key: 'waiting', says: `${waiting.length === 1 ? '1 piece waits' : `${waiting.length} pieces wait`} for a look, the oldest ${days(oldest).replace('today', 'since today')}.`, cells: waiting.map(key), people: [] })
  if (away.length > 0) tallies.push({ key: 'away', says: `${away.length === 1 ? '1 person has' : `${away.length} people have`} had no bench time for ${AWAY_DAYS} days.`, cells: [], people: away.map(row => row.id) })
  if (cells.length > 0) tallies.push({ key: 'three', says: `${three.length} of ${cells.length} are at 3 or above.`, cells: three.map(key), people: [] })
  return tallies
}

/** The day a person was last at a bench, as it is said in a table. */
export function lastAtWords(day: string | null, today: string): string {
  if (day === null) return 'never'
  const ago = daysBetween(day, today)
  return ago <= 0 ? 'today' : ago === 1 ? 'yesterday' : `${ago} days`
}
