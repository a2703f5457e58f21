/** A measure or count as it is typed on the keypad of the bench. A value is never there beforehand. */
export const DIGITS = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '0'] as const
export type KeypadKey = (typeof DIGITS)[number] | 'point' | 'back'
/** Before and after the point: a metre in mm, to the hundredth of a micrometer. */
const MOST_WHOLE = 4
const MOST_PARTS = 3

/** What stands after a key. A second point, a digit too many and a point in a whole number change nothing. */
export function typeKey(text: string, key: KeypadKey, whole = false): string {
  if (key === 'back') return text.slice(0, -1)
  if (key === 'point') return whole || text.includes('.') ? text : text === '' ? '0.' : `${text}.`
  if (text === '0') return key
  const [before = '', parts] = text.split('.')
  if (parts === undefined ? before.length >= MOST_WHOLE : parts.length >= MOST_PARTS) return text
  return text + key
}

/** The typed number as decimal text, or null while nothing stands there. */
export function typedNumber(text: string): string | null {
  if (!/^\d+(\.\d*)?$/.test(text)) return null
  return text.includes('.') ? text.replace(/\.?0*$/, '') : text
}

/** A key of a keyboard as a key of the keypad; a comma is a point. */
export function keypadKey(key: string): KeypadKey | null {
  if (key === '.' || key === ',') return 'point'
  if (key === 'Backspace') return 'back'
  return DIGITS.find(digit => digit === key) ?? null
}
