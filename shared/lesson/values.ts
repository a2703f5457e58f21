/** A value and its kind, in base units: mm, mm2, g, deg, s, N; the studio's money as it is. */
import type { FIGURE_UNITS, Kind } from './schema'

export type NumberKind = Exclude<Kind, 'metal' | 'choice' | 'yes_no'>
export type Value = { kind: NumberKind, value: number } | { kind: 'metal' | 'choice', value: string } | { kind: 'yes_no', value: boolean }
/** The names an expression may use. */
export type Scope = Record<string, Value>
export type Result = { ok: true, value: Value } | { ok: false, says: string }

/** What one of a unit is in its kind's base unit. 1 in = 25.4 mm exactly. */
export const UNIT_TABLE: Record<(typeof FIGURE_UNITS)[number], { kind: NumberKind, base: number }> = {
  mm: { kind: 'length', base: 1 }, cm: { kind: 'length', base: 10 }, m: { kind: 'length', base: 1000 }, in: { kind: 'length', base: 25.4 },
  g: { kind: 'mass', base: 1 }, mg: { kind: 'mass', base: 0.001 }, N: { kind: 'force', base: 1 }, deg: { kind: 'angle', base: 1 },
  s: { kind: 'time', base: 1 }, min: { kind: 'time', base: 60 }, h: { kind: 'time', base: 3600 },
}
