import type { Turn } from '#shared/bench/machine'
import { scopeAt, type SetOut } from '#shared/bench/set-out'
import { plainText } from '#shared/lesson/plain'
import type { Inline } from '#shared/lesson/schema'
import { type LengthUnits, shownValue } from '#shared/lesson/shown'
import type { Scope } from '#shared/lesson/values'

/** What a lesson's text needs to be shown: its figures, the hand, and where its pictures are. */
export interface LessonShown {
  /** Sizes and figures by name, as an expression would read them. */
  scope: Scope
  units: LengthUnits
  /** Left-handed view. */
  left: boolean
  /** The finished object may be the mirror image, so turns follow the hand. */
  mayMirror: boolean
  pictureAt: (name: string) => string
}

const SHOWN: InjectionKey<Ref<LessonShown>> = Symbol('figures of a lesson as shown')

export const provideLessonShown = (shown: Ref<LessonShown>): void => provide(SHOWN, shown)

export function useLessonShown(): Ref<LessonShown> {
  const shown = inject(SHOWN, null)
  if (!shown) throw new Error('A lesson is shown with its figures.')
  return shown
}

/** A figure as it reads; a name that has no value here says so instead of nothing. */
export function figureText({ scope, units }: LessonShown, name: string, to?: number): string {
  const value = scope[name]
  return value ? shownValue(value, units, to) : `${name}?`
}

export const turningText = ({ left, mayMirror }: LessonShown, way: 'clockwise' | 'anticlockwise'): string =>
  left && mayMirror ? (way === 'clockwise' ? 'anticlockwise' : 'clockwise') : way

/** A line as plain words. */
export const wordsOf = (shown: LessonShown, line: readonly Inline[]): string =>
  plainText(line.map(part => part.t === 'turning' ? { t: 'text', v: turningText(shown, part.v) } : part), (name, to) => figureText(shown, name, to))

/** What is shown in one turn of a piece. */
export function shownIn(base: Omit<LessonShown, 'scope'>, set: SetOut, turn: Turn | null): LessonShown {
  return { ...base, scope: turn ? scopeAt(set, turn) : set.scope }
}
