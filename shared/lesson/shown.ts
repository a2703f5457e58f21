/** How a value reads on screen and paper, in the units a person likes. */
import { inInches } from '../trade/units'
import type { Value } from './values'

export const LENGTH_UNITS = ['mm', 'in', 'both'] as const
export type LengthUnits = (typeof LENGTH_UNITS)[number]

const FRACTIONS: Readonly<Record<string, string>> = { 0.25: '¼', 0.5: '½', 0.75: '¾' }
const trimmed = (value: number, places: number): string => {
  const text = value.toFixed(places)
  const short = text.includes('.') ? text.replace(/\.?0+$/, '') : text
  return short === '-0' ? '0' : short
}

/** Three figures, as far as a bench can measure: 102, 44.8, 4.45, 0.7. */
function sensibly(value: number): string {
  const size = Math.abs(value)
  return trimmed(value, size >= 99.95 ? 0 : size >= 9.995 ? 1 : 2)
}

/** To the nearest `to`; its own places are kept, so that 4 to the nearest 0.5 reads 4.0 as a rule would be read. */
function nearest(value: number, to: number): string {
  const places = Math.min(4, trimmed(to, 4).split('.')[1]?.length ?? 0)
  return (Math.round(value / to) * to).toFixed(places)
}

/** A plain number; halves and quarters as they are said at the bench. */
function plainNumber(value: number): string {
  const whole = Math.floor(value)
  const fraction = FRACTIONS[Number((value - whole).toFixed(6))]
  if (fraction && value >= 0 && whole < 1000) return `${whole > 0 ? whole : ''}${fraction}`
  return sensibly(value)
}

function shownTime(seconds: number): string {
  if (seconds >= 3600) return `${trimmed(seconds / 3600, 1)} h`
  return seconds >= 60 ? `${trimmed(seconds / 60, 1)} min` : `${trimmed(seconds, 0)} s`
}

/** A length in the person's units; in inches always the nearest 64th. */
export function shownLength(mm: number, units: LengthUnits, to?: number): string {
  const metric = `${to ? nearest(mm, to) : sensibly(mm)} mm`
  if (units === 'mm') return metric
  return units === 'in' ? inInches(mm) : `${metric} (${inInches(mm)})`
}

/** A value as it is shown; `to` rounds to the nearest of that (mm for a length, else its own unit). */
export function shownValue(value: Value, units: LengthUnits = 'mm', to?: number): string {
  switch (value.kind) {
    case 'metal': case 'choice': return value.value
    case 'yes_no': return value.value ? 'yes' : 'no'
    case 'length': return shownLength(value.value, units, to)
    case 'count': return trimmed(value.value, 0)
    case 'time': return shownTime(value.value)
    default: return inOwnUnit(value.kind, to ? nearest(value.value, to) : value.kind === 'number' ? plainNumber(value.value) : sensibly(value.value))
  }
}

function inOwnUnit(kind: 'number' | 'area' | 'mass' | 'angle' | 'force' | 'money', text: string): string {
  switch (kind) {
    case 'mass': return `${text} g`
    case 'area': return `${text} mm²`
    case 'angle': return `${text}°`
    case 'force': return `${text} N`
    default: return text
  }
}

/** A plain decimal (as a reading is kept, in its base unit) with its unit. */
export function shownReading(value: number, unit: string, units: LengthUnits = 'mm'): string {
  if (unit === 'mm') return units === 'mm' ? `${trimmed(value, 3)} mm` : units === 'in' ? inInches(value) : `${trimmed(value, 3)} mm (${inInches(value)})`
  return unit === 'count' || unit === 'number' ? trimmed(value, 3) : unit === 'deg' ? `${trimmed(value, 1)}°` : `${trimmed(value, 3)} ${unit}`
}
