/** A time of today as 10:41, of another day with its date; in the reader's own zone. */
export function shortTime(iso: string, now = new Date()): string {
  const at = new Date(iso)
  const clock = at.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' })
  return at.toDateString() === now.toDateString() ? clock : `${at.toLocaleDateString('en-GB', { day: 'numeric', month: 'short', year: 'numeric' })}, ${clock}`
}

/** 2 March 2026, in UTC so that server and browser write the same. */
export const longDay = (iso: string): string => new Date(iso).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' })

/** How many of a thing, in words where the number is small. */
const SMALL = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve']
export const countWords = (n: number, one: string, many: string): string => `${SMALL[n] ?? n} ${n === 1 ? one : many}`

/** Minutes of work as they are said: 25 min, 1½ h, 4 h. */
export function workTime(minutes: number): string {
  const hours = minutes / 60
  if (hours < 1.5 || !Number.isInteger(hours * 2)) return `${minutes} min`
  return `${Math.floor(hours)}${Number.isInteger(hours) ? '' : '½'} h`
}
