/** The lines a piece is judged by, in the order of the looks, and what the measures already say of them. */
import { isWithin, limitsOf } from '../bench/answers'
import { newestSamples, type SetOut } from '../bench/set-out'
import type { State, TakenReading } from '../bench/state'
import { evaluate, isTrue } from '../lesson/figures'
import type { Criterion, Lesson, Node, Reading } from '../lesson/schema'

export const BANDS = ['30 cm', 'loupe', 'measure', 'finger, stocking', 'move it', 'seen live'] as const
export type Band = (typeof BANDS)[number]
/** Levels 0 to 5, as the index of a list. */
const LEVELS = [0, 1, 2, 3, 4, 5] as const

export interface Limit { low: number, high: number }
/** One measure as it was taken: the newest of its turn. */
export interface Take { turn: string | null, values: number[], typed: string[], gauge: string }
export interface Line {
  key: string
  says: string
  band: Band
  how: string | null
  by: Criterion['by']
  essential: boolean
  live: boolean
  /** Names of the pictures that show yes, nearly and no. */
  pictures: Record<string, string>
  reading: { name: string, ask: string, unit: Reading['unit'], with: string | null, step: number | null, less: number | null, gives: string | null } | null
  takes: Take[]
  /** What is compared with the limits: the value furthest out, or the widest spread; null where nothing was measured. */
  value: number | null
  /** By level 0 to 5; null where the lesson gives none. */
  limits: (Limit | null)[]
  inside: (boolean | null)[]
}

/** Which look a line belongs to, by how it is judged. */
export function bandOf({ by, live, how }: Pick<Criterion, 'by' | 'live' | 'how'>): Band {
  if (live) return 'seen live'
  if (by !== 'judge') return 'measure'
  const words = (how ?? '').toLowerCase()
  if (/loupe|10x|magnif/.test(words)) return 'loupe'
  if (/stocking|finger\b|floss/.test(words)) return 'finger, stocking'
  if (/balance|pull|hang it|tug|shake|swing|turn it|move|drop/.test(words)) return 'move it'
  return /calliper|caliper|shank|gauge pin|scales/.test(words) ? 'measure' : '30 cm'
}

/** The lines of this piece: only those whose `when` is true for it; one look after another, as the lesson first names them. */
export function linesOf(set: SetOut, state: State): Line[] {
  const lines = set.lesson.criteria.filter(one => one.when === null || isTrue(one.when, set.scope)).map(one => lineOf(set, state, one))
  const looks = [...new Set(lines.map(line => line.band))]
  return looks.flatMap(look => lines.filter(line => line.band === look))
}

function lineOf(set: SetOut, state: State, criterion: Criterion): Line {
  const { key, says, by, how, essential, live, pictures } = criterion
  const reading = criterion.reading === null ? null : set.lesson.readings.find(one => one.name === criterion.reading) ?? null
  const base = { key, says, by, how, essential, live, pictures, band: bandOf(criterion) }
  if (by === 'judge' || !reading) return { ...base, reading: null, takes: [], value: null, limits: LEVELS.map(() => null), inside: LEVELS.map(() => null) }
  const takes = takesOf(state, reading.name)
  const limits = LEVELS.map(level => limitOf(set, state, criterion, reading, level))
  const line = {
    ...base, takes, limits, value: valueOf(by, takes, limits[5] ?? null),
    reading: { name: reading.name, ask: reading.ask, unit: reading.unit, with: reading.with, step: reading.step, less: numberOf(set, reading.less), gives: reading.gives },
  }
  return { ...line, inside: LEVELS.map(level => takes.length === 0 ? null : takesInside(set, state, line, reading, level)) }
}

/** The newest measure of each turn; one taken again stands for the one before. */
function takesOf(state: State, name: string): Take[] {
  const newest = new Map<string, TakenReading>()
  for (const taken of state.readings) if (taken.reading === name) newest.set(taken.turn ?? '', taken)
  return [...newest.values()].map(({ turn, values, typed, gauge }) => ({ turn, values: values.map(Number), typed, gauge }))
}

function numberOf(set: SetOut, node: Node | null): number | null {
  if (node === null) return null
  const result = evaluate(node, set.scope)
  return result.ok && typeof result.value.value === 'number' ? result.value.value : null
}

function limitOf(set: SetOut, state: State, criterion: Criterion, reading: Reading, level: number): Limit | null {
  if (criterion.by === 'spread') {
    const node = [...criterion.atLevels].sort((a, b) => a.level - b.level).find(at => level <= at.level)?.within ?? criterion.within
    const most = numberOf(set, node)
    return most === null ? null : { low: 0, high: most }
  }
  const limits = limitsOf(set.lesson, reading, set.scope, level, samplesFor(set, state, reading))
  return limits === null ? null : { low: limits.low, high: limits.high }
}

/** A reading that is its own sample is not held to itself. */
function samplesFor(set: SetOut, state: State, reading: Reading): Record<string, number> {
  const samples = newestSamples(set, state)
  return reading.sampleOf === reading.name ? {} : samples
}

const spreadOf = (values: readonly number[]): number => values.length < 2 ? Number.NaN : Math.max(...values) - Math.min(...values)

function valueOf(by: Criterion['by'], takes: readonly Take[], limit: Limit | null): number | null {
  if (by === 'spread') {
    const spreads = takes.map(take => spreadOf(take.values)).filter(Number.isFinite)
    return spreads.length > 0 ? Math.max(...spreads) : null
  }
  const values = takes.flatMap(take => take.values)
  const middle = limit ? (limit.low + limit.high) / 2 : 0
  return values.length > 0 ? values.reduce((far, value) => Math.abs(value - middle) > Math.abs(far - middle) ? value : far) : null
}

function takesInside(set: SetOut, state: State, line: Pick<Line, 'by' | 'limits' | 'takes' | 'value'>, reading: Reading, level: number): boolean {
  if (line.by === 'spread') return line.value === null ? false : isInside(line, line.value, level) ?? true
  const limits = limitsOf(set.lesson, reading, set.scope, level, samplesFor(set, state, reading))
  return line.takes.every(take => isWithin(take.values, reading, limits))
}

/** A hair over the limit is the limit: values are typed to a tenth or a hundredth, and doubles do not hold those. */
const HAIR = 1e-9

/** Is a value inside a line's limits at a level? Null where it has none. */
export function isInside(line: Pick<Line, 'limits'>, value: number, level: number): boolean | null {
  const limit = line.limits[level] ?? null
  return limit === null ? null : value >= limit.low - HAIR && value <= limit.high + HAIR
}

/**
 * The one measured line the judge is asked to measure again: drawn from the piece's hash, which nobody can choose. Null
 * where nothing was measured.
 */
export function againOf(lines: readonly Line[], head: string): string | null {
  const measured = lines.filter(line => line.by === 'measure' && line.takes.length > 0)
  if (measured.length === 0) return null
  return measured[Number.parseInt(head.slice(0, 8), 16) % measured.length]?.key ?? null
}

/** The faults a lesson names, each once, as a judge may point to them. */
export function faultsOf(lesson: Lesson): Lesson['faults'] {
  const all = [...lesson.faults, ...lesson.parts.flatMap(part => part.steps.flatMap(step => step.faults))]
  return [...new Map(all.map(fault => [fault.key, fault])).values()]
}
