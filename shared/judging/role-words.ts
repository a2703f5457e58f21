/** Words of people's parts and ages on the screens. */
import type { AgeBand, Role } from '../schemas/lists'

export const ROLE_WORDS: Record<Role, string> = { apprentice: 'Apprentice', instructor: 'Instructor', manager: 'Manager', assessor: 'Assessor' }
export const ROLE_MEANS: Record<Role, string> = {
  apprentice: 'makes pieces and sees their own record', instructor: 'writes lessons, judges and signs', manager: 'looks after people, classes and the studio; does not judge', assessor: 'from outside; reads the record of this studio and nothing else',
}
export const AGE_WORDS: Record<AgeBand, string> = { 'adult': '18 or older', '16-17': '16 or 17', 'under-16': 'under 16' }
/** 1 Monday to 7 Sunday (ISO 8601). */
export const WEEKDAY_WORDS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const
export const weekdayWord = (weekday: number): string => WEEKDAY_WORDS[weekday - 1] ?? ''

/** "17 March 2026", by the day alone. */
export function dayWords(day: string): string {
  const [year = 0, month = 1, date = 1] = day.slice(0, 10).split('-').map(Number)
  return new Date(Date.UTC(year, month - 1, date)).toLocaleDateString('en-GB', { timeZone: 'UTC', day: 'numeric', month: 'long', year: 'numeric' })
}
