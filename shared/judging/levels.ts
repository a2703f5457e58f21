/** The levels of a sign-off: how much help a person needs with a lesson, in bench words. */
export const LEVELS = [
  { no: 0, says: 'Not started', means: 'Nothing is signed yet.' },
  { no: 1, says: 'Watched', means: 'Has watched, is briefed, and has answered the questions asked before the start.' },
  { no: 2, says: 'With me beside you', means: 'An instructor is at the bench the whole time at heat, motor, acid or hold points.' },
  { no: 3, says: 'With me in the room', means: 'Works alone with an instructor within call; hold points are looked at.' },
  { no: 4, says: 'On your own', means: 'Practice and studio stock at an open bench; no one need look until the end.' },
  { no: 5, says: 'May teach', means: 'May show others.' },
] as const
export type Level = (typeof LEVELS)[number]['no']
/** The levels that can be signed. */
export const SIGNED_LEVELS = [1, 2, 3, 4, 5] as const
export type SignedLevel = (typeof SIGNED_LEVELS)[number]

export const isSignedLevel = (no: number): no is SignedLevel => SIGNED_LEVELS.some(level => level === no)

/** The screen words of a level: "With me in the room, 3". */
export function levelWords(no: number): string {
  const level = LEVELS.find(one => one.no === no)
  return level && level.no > 0 ? `${level.says}, ${level.no}` : 'Not started'
}
