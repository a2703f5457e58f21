/** Days as `2026-03-01`, in a studio's own time zone. A day has no hours: sums on it are done in UTC, where every day has 24. */

const DAY = /^\d{4}-\d\d-\d\d$/
const MS = 86_400_000

/** The day it is in a zone (IANA name) at a moment. */
export function dayIn(at: Date, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', { timeZone: zone, year: 'numeric', month: '2-digit', day: '2-digit' }).formatToParts(at)
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.find(one => one.type === type)?.value ?? ''
  return `${part('year').padStart(4, '0')}-${part('month')}-${part('day')}`
}

function middayOf(day: string): number {
  const at = DAY.test(day) ? Date.parse(`${day}T12:00:00Z`) : Number.NaN
  if (Number.isNaN(at)) throw new RangeError(`Not a day: ${day}`)
  return at
}

export const addDays = (day: string, days: number): string => new Date(middayOf(day) + days * MS).toISOString().slice(0, 10)

/** Days from one day to another; negative when the second is earlier. */
export const daysBetween = (from: string, to: string): number => Math.round((middayOf(to) - middayOf(from)) / MS)

export const laterOf = (a: string, b: string): string => a > b ? a : b
