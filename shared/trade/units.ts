/** What people type for a size, and how a size is shown. */
import { cordToMm } from './cord'
import { awgToMm, swgToMm } from './wire'

export type TypedUnit = 'mm' | 'wire' | 'cord' | 'g' | 'deg' | 'N' | 'count' | 'number'
export type TypedValue = { ok: true, value: number } | { ok: false, says: string }
const no = (says: string): TypedValue => ({ ok: false, says })
const MM_OF: Record<string, number> = { mm: 1, cm: 10, m: 1000, in: 25.4, inch: 25.4, inches: 25.4, '"': 25.4 }

/**
 * Reads what was typed into a value of the base unit (mm for mm, wire and cord). Takes `12`, `12 mm`, `1/2 in`, `1 1/2 in`,
 * `0,7`, `20 awg`, `20 swg`, `size 4`, `2½`. `20 gauge` is asked back, as the two systems differ by an eighth.
 */
export function readTyped(text: string, unit: TypedUnit): TypedValue {
  const plain = text.trim().toLowerCase().replace(/,(?=\d)/, '.').replace('½', ' 1/2').replace('¼', ' 1/4').replace('¾', ' 3/4').trim()
  if (plain === '') return no('Missing: a number.')
  if (unit === 'cord') { const cord = cordToMm(plain); if (cord !== null) return { ok: true, value: cord } }
  // A space parts whole and fraction: without it 53/64 would be 5 and 3/64.
  const match = /^(?:(-?\d+(?:\.\d+)?|-?\.\d+)(?=\s|[a-z"°]|$))?\s*(?:(\d+)\/(\d+))?\s*([a-z"°]*)$/.exec(plain)
  if (!match || (match[1] === undefined && match[2] === undefined) || (match[2] !== undefined && match[1]?.includes('.'))) return no(`“${text.trim()}” is no number. ${exampleOf(unit)}`)
  const number = Number(match[1] ?? 0) + (match[2] ? Number(match[2]) / Number(match[3]) : 0)
  if (!Number.isFinite(number)) return no(`“${text.trim()}” is no number. ${exampleOf(unit)}`)
  return inUnit(number, match[4] ?? '', unit, text.trim())
}

function inUnit(number: number, written: string, unit: TypedUnit, text: string): TypedValue {
  if (number < 0) return no('A size is not below nought.')
  if (unit === 'count') return written !== '' || !Number.isInteger(number) ? no('A whole number, as 7.') : { ok: true, value: number }
  if (unit === 'mm' || unit === 'wire' || unit === 'cord') return length(number, written, unit, text)
  const own = { g: ['', 'g'], deg: ['', 'deg', '°'], N: ['', 'n'], number: [''] }[unit]
  return own.includes(written) ? { ok: true, value: number } : no(`“${written}” is no unit for this. ${exampleOf(unit)}`)
}

function length(number: number, written: string, unit: 'mm' | 'wire' | 'cord', text: string): TypedValue {
  const factor = written === '' ? 1 : MM_OF[written]
  if (factor !== undefined) return { ok: true, value: Number((number * factor).toFixed(6)) }
  if (written === 'gauge' || written === 'ga' || written === 'g') return no(`${number} what? ${number} awg, ${number} swg or a size in mm.`)
  if (unit === 'wire' && written === 'awg') return Number.isInteger(number) && number <= 40 ? { ok: true, value: Number(awgToMm(number).toFixed(6)) } : no('AWG numbers are whole, up to 40.')
  if (unit === 'wire' && written === 'swg') { const mm = swgToMm(number); return mm === null ? no('SWG is known here from 10 to 30.') : { ok: true, value: Number(mm.toFixed(6)) } }
  return no(`“${text}” is no size. ${exampleOf(unit)}`)
}

const exampleOf = (unit: TypedUnit): string => ({
  mm: 'Write 8, 8 mm or 5/16 in.', wire: 'Write 0.7 mm, 21 awg or 22 swg.', cord: 'Write size 4 or 0.6 mm.', g: 'Write 2.5 g.', deg: 'Write 90.', N: 'Write 10 N.', count: 'Write a whole number, as 7.', number: 'Write a number, as 2.5.',
})[unit]

/** A length in mm as inches to the nearest 64th: `5/16 in`, `1 3/64 in`. */
export function inInches(mm: number): string {
  const parts = Math.round(mm / 25.4 * 64)
  const whole = Math.floor(parts / 64)
  let top = parts % 64
  let bottom = 64
  while (top > 0 && top % 2 === 0) { top /= 2; bottom /= 2 }
  const fraction = top > 0 ? `${top}/${bottom}` : ''
  return `${[whole > 0 || fraction === '' ? String(whole) : '', fraction].filter(Boolean).join(' ')} in`
}
