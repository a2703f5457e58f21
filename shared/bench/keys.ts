/**
 * What a pedal or a key means at the bench. A plain step goes on or back at the press; where something is asked, a short
 * press walks between the answers and only Enter, or a press kept down and let go in time, says the lit one.
 */
export const SHORT_MS = 400
export const KEPT_FROM_MS = 800
export const KEPT_TO_MS = 2000
/** After an act, presses are dropped for this long: pedals bounce. */
export const REST_MS = 300

export type KeyWay = 'next' | 'back' | 'say' | 'help'
/** `next` and `back` go through the steps; `on` and `off` walk between answers; `say` says the lit one. */
export type KeyAct = 'next' | 'back' | 'walk-on' | 'walk-back' | 'say' | 'help'

/** Keys as pedals and clickers send them. Enter says an answer and never goes on. */
export const KEY_WAYS: Readonly<Record<string, KeyWay>> = {
  PageDown: 'next', ArrowRight: 'next', ArrowDown: 'next', PageUp: 'back', ArrowLeft: 'back', ArrowUp: 'back', Enter: 'say', NumpadEnter: 'say', KeyH: 'help',
}

/** What is on the screen: its id changes whenever something else is asked. */
export interface KeyScreen { id: string, walks: boolean }
export interface KeyState {
  /** The one key that is down; `screen` is where it went down, and `spent` that it has acted already. */
  down: { code: string, way: KeyWay, at: number, screen: string, spent: boolean } | null
  /** When something was last done; null before the first. */
  actedAt: number | null
}
export interface KeyStep { state: KeyState, act: KeyAct | null }

export const NO_KEYS: KeyState = { down: null, actedAt: null }

const resting = (state: KeyState, at: number): boolean => state.actedAt !== null && at - state.actedAt < REST_MS

/** A key goes down. Repeats, a second key beside one that is down, and what comes too soon after an act do nothing. */
export function press(state: KeyState, key: { code: string, at: number, repeat: boolean }, screen: KeyScreen): KeyStep {
  const way = KEY_WAYS[key.code]
  if (!way || key.repeat || state.down) return { state, act: null }
  const down = { code: key.code, way, at: key.at, screen: screen.id, spent: false }
  if (resting(state, key.at)) return { state: { ...state, down: { ...down, spent: true } }, act: null }
  const act = atPress(way, screen)
  return act ? { state: { down: { ...down, spent: true }, actedAt: key.at }, act } : { state: { ...state, down }, act: null }
}

function atPress(way: KeyWay, screen: KeyScreen): KeyAct | null {
  if (way === 'help') return 'help'
  if (way === 'say') return screen.walks ? 'say' : null
  return screen.walks ? null : way
}

/** A key comes up. What went down on another screen has no meaning on this one. */
export function release(state: KeyState, key: { code: string, at: number }, screen: KeyScreen): KeyStep {
  const { down } = state
  if (!down || down.code !== key.code) return { state, act: null }
  const up: KeyState = { ...state, down: null }
  if (down.spent || down.screen !== screen.id || !screen.walks || (down.way !== 'next' && down.way !== 'back')) return { state: up, act: null }
  const kept = key.at - down.at
  if (kept < SHORT_MS) return { state: { down: null, actedAt: key.at }, act: down.way === 'next' ? 'walk-on' : 'walk-back' }
  if (kept >= KEPT_FROM_MS && kept <= KEPT_TO_MS) return { state: { down: null, actedAt: key.at }, act: 'say' }
  return { state: up, act: null }
}

/** The window lost the keys: nothing is down any more. */
export const letGo = (state: KeyState): KeyState => ({ ...state, down: null })

/** How far the press that says an answer has come: 0 to 1 and in time to let go, or null when no press counts (any more). */
export function keptDown(state: KeyState, at: number, screen: KeyScreen): { part: number, inTime: boolean } | null {
  const { down } = state
  if (!down || down.spent || !screen.walks || down.screen !== screen.id || (down.way !== 'next' && down.way !== 'back')) return null
  const kept = at - down.at
  if (kept < SHORT_MS || kept > KEPT_TO_MS) return null
  return { part: Math.min(1, (kept - SHORT_MS) / (KEPT_FROM_MS - SHORT_MS)), inTime: kept >= KEPT_FROM_MS }
}

/** The next stop of a walk, round and round; from nothing lit, the first or the last. */
export function walk(stops: readonly string[], lit: string | null, way: 1 | -1): string | null {
  if (stops.length === 0) return null
  const at = lit === null ? -1 : stops.indexOf(lit)
  if (at < 0) return stops[way === 1 ? 0 : stops.length - 1] ?? null
  return stops[(at + way + stops.length) % stops.length] ?? null
}
