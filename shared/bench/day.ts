/** The calendar day (YYYY-MM-DD) of a moment in a studio's time zone (IANA name). */
export function dayIn(zone: string, moment: Date): string {
  const parts = new Intl.DateTimeFormat('en-CA', { timeZone: zone, year: 'numeric', month: '2-digit', day: '2-digit' }).formatToParts(moment)
  const of = (type: string) => parts.find(part => part.type === type)?.value ?? ''
  return `${of('year')}-${of('month')}-${of('day')}`
}
