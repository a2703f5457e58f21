/** Sums on days as `2026-03-01`. A day has no hours: they are done in UTC, where every day has 24. `dayIn` of bench/day.ts says which day it is. */

const DAY = /^\d{4}-\d\d-\d\d$/
const MS = 86_400_000

function middayOf(day: string): number {
  const at = DAY.test(day) ? Date.parse(`${day}T12:00:00Z`) : Number.NaN
  if (Number.isNaN(at)) throw new RangeError(`Not a day: ${day}`)
  return at
}

export const addDays = (day: string, days: number): string => new Date(middayOf(day) + days * MS).toISOString().slice(0, 10)

/** Days from one day to another; negative when the second is earlier. */
export const daysBetween = (from: string, to: string): number => Math.round((middayOf(to) - middayOf(from)) / MS)

export const laterOf = (a: string, b: string): string => a > b ? a : b
