/** The calendar day (YYYY-MM-DD) of a moment in a studio's time zone (IANA name). */
export function dayIn(zone: string, moment: Date): string {
  const parts = new Intl.DateTimeFormat('en-CA', { timeZone: zone, year: 'numeric', month: '2-digit', day: '2-digit' }).formatToParts(moment)
  const of = (type: string) => parts.find(part => part.type === type)?.value ?? ''
  return `${of('year')}-${of('month')}-${of('day')}`
}

const HOUR = 3_600_000

/** The first moment of the next day in a zone, to the millisecond: days of 23 and 25 hours included. */
export function endOfDay(zone: string, day: string): Date {
  let [before, after] = [Date.parse(`${day}T00:00:00Z`) - 15 * HOUR, Date.parse(`${day}T00:00:00Z`) + 40 * HOUR]
  while (after - before > 1) {
    const middle = Math.floor((before + after) / 2)
    if (dayIn(zone, new Date(middle)) <= day) before = middle
    else after = middle
  }
  return new Date(after)
}
