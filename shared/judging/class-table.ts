/** The class progress table: what each cell shows and says, and the tallies over it. */
import type { Permission } from '../lesson/schema'
import type { AgeBand } from '../schemas/lists'
import { daysBetween } from './days'
import { lapse, type Lapsed } from './lapse'
import { levelWords } from './levels'
import { PERMISSION_WORDS, type PermissionState } from './permissions'
import type { JudgingSettings } from './settings'

export const CELL_GLYPHS = ['bare', 'at', 'waits', 'back', 'signed', 'once', 'lapsed', 'suspended', 'due', 'closed'] as const
export type CellGlyph = (typeof CELL_GLYPHS)[number]

type GoingOn = Extract<CellGlyph, 'at' | 'waits' | 'back'>

/** What keeps a person from a lesson whatever their level: too young for it, a permission not held, or one suspended. */
export interface Bar { permission: Permission, why: 'age' | 'none' | 'suspended' }

/** The bar that counts most: a suspension is said before an age, an age before what is merely not held. */
export function barOf(asked: readonly Permission[], held: Partial<Record<Permission, PermissionState>>, ageBand: AgeBand, settings: Pick<JudgingSettings, 'youngForbid'>): Bar | null {
  const bars = asked.filter(permission => permission !== 'goods').flatMap((permission): Bar[] => {
    if (held[permission] === 'suspended') return [{ permission, why: 'suspended' }]
    if (ageBand !== 'adult' && settings.youngForbid.includes(permission)) return [{ permission, why: 'age' }]
    return held[permission] === 'held' ? [] : [{ permission, why: 'none' }]
  })
  return bars.find(bar => bar.why === 'suspended') ?? bars.find(bar => bar.why === 'age') ?? bars[0] ?? null
}

const BAR_SAYS: Record<Bar['why'], (permission: string) => string> = {
  age: permission => `not open at this age: it needs ${permission}`, none: permission => `not open yet: ${permission} is not held`, suspended: permission => `${permission} is suspended`,
}
const barSays = (bar: Bar): string => BAR_SAYS[bar.why](PERMISSION_WORDS[bar.permission])

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
  also: { glyph: GoingOn, says: string } | null
  /** Where a piece stands at the bench, "6/16". */
  step: string | null
  /** Days a piece has waited. */
  waits: number | null
  /** The whole cell in words. */
  says: string
}
export interface TableRow { id: string, name: string, lastAt: string | null, cells: Cell[] }
export interface TableColumn { id: string, slug: string, title: string }

const days = (n: number): string => n === 0 ? 'today' : n === 1 ? '1 day' : `${n} days`

/** A cell. A bar closes what is not begun; where work is on record it is shown all the same, a suspension with it. */
export function cellOf(of: { person: string, lesson: string }, facts: CellFacts | null, bar: Bar | null, settings: JudgingSettings, today: string): Cell {
  const held = facts ? lapse(facts, settings, today) : null
  const also = facts ? goingOn(facts, today) : null
  const isSuspended = bar?.why === 'suspended'
  const base = { ...of, waits: facts?.waitingOn ? daysBetween(facts.waitingOn, today) : null, step: also?.glyph === 'at' ? stepOf(facts) : null }
  if (held && held.level > 0 && facts) {
    const says = [saysOfLevel(held, facts, today), isSuspended ? barSays(bar) : null, also?.says].filter(Boolean).join('; ')
    return { ...base, glyph: isSuspended ? 'suspended' : oliveOf(held, facts), level: held.level, also, says }
  }
  if (also) return { ...base, glyph: also.glyph, level: null, also: null, says: also.says }
  if (bar) return { ...base, glyph: 'closed', level: null, also: null, says: barSays(bar) }
  return { ...base, glyph: 'bare', level: null, also: null, says: 'not begun' }
}

const stepOf = (facts: CellFacts | null): string | null => facts?.placeNo && facts.places ? `${facts.placeNo}/${facts.places}` : null

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
  if (facts.openPiece) return { glyph: 'at', says: `at the bench${facts.placeNo && facts.places ? `, step ${facts.placeNo} of ${facts.places}` : ''}` }
  return facts.sentBackOn ? { glyph: 'back', says: `a piece sent back ${days(daysBetween(facts.sentBackOn, today))} ago`.replace('today ago', 'today') } : null
}

export interface Tally { key: 'waiting' | 'away' | 'three', says: string, /** Cells (`person lesson`) or people it is about. */ cells: string[], people: string[] }
/** Days without bench time that are said aloud; a judgement of ours, without a source. */
export const AWAY_DAYS = 14

/** Whether a person has been away from the bench for so long that the table says it. */
export const isAway = (lastAt: string | null, today: string): boolean => lastAt === null || daysBetween(lastAt, today) >= AWAY_DAYS

/** The tallies as sentences. What is not open stays out of every one. */
export function talliesOf(rows: readonly TableRow[], today: string): Tally[] {
  const cells = rows.flatMap(row => row.cells).filter(cell => cell.glyph !== 'closed')
  const key = (cell: Cell) => `${cell.person} ${cell.lesson}`
  const waiting = cells.filter(cell => cell.waits !== null)
  const oldest = Math.max(0, ...waiting.map(cell => cell.waits ?? 0))
  const away = rows.filter(row => isAway(row.lastAt, today))
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
