/** The words of the judging screens, in one place. */
import type { Outcome, Says, Seen } from '../schemas/lists'

export const SAYS_WORDS: Record<Says, string> = { yes: 'yes', nearly: 'nearly', no: 'no' }
/** In the order of the keys 1, 2, 3. */
export const SAYS_KEYS: readonly Says[] = ['no', 'nearly', 'yes']
export const OUTCOME_WORDS: Record<Outcome, string> = { 'kept': 'kept', 'sent-back': 'sent back', 'mend': 'to mend' }
export const SEEN_WORDS: Record<Seen, string> = { whole: 'from start to finish', holds: 'at hold points', piece: 'the piece in the hand', photo: 'a photo only' }
/** Weakest last: what may be said of how much a judge saw. */
export const SEEN_MEANS: Record<Seen, string> = {
  whole: 'You watched the whole making.', holds: 'You were there at the hold points.', piece: 'You saw none of the making. Lines that are seen live stay open.',
  photo: 'Never enough by itself above level 2.',
}
export const ABOUT_WORDS: Record<string, string> = { stuck: 'is stuck', check: 'asks for a look', hold: 'waits at a hold point' }

const MINUTE = 60_000
/** "5 days", "2 hours", "4 min": how long ago, as one says it. */
export function agoWords(from: string, now: string): string {
  const minutes = Math.max(0, Math.floor((Date.parse(now) - Date.parse(from)) / MINUTE))
  const some = (count: number, word: string) => `${count} ${word}${count === 1 ? '' : 's'}`
  if (minutes < 60) return `${minutes} min`
  if (minutes < 48 * 60) return some(Math.floor(minutes / 60), 'hour')
  return some(Math.floor(minutes / 1440), 'day')
}

/** A number to as many places as its step has, and never more than two. */
export function measureWords(value: number, step: number | null): string {
  const places = step === null ? 1 : Math.min(2, Math.max(0, Math.ceil(-Math.log10(step) - 1e-9)))
  return value.toFixed(places)
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
/** "27 Oct 2026" from a day or from a moment as text. */
export function dayWords(at: string): string {
  const [year = '', month = '', day = ''] = at.slice(0, 10).split('-')
  return `${Number(day)} ${MONTHS[Number(month) - 1] ?? month} ${year}`
}
