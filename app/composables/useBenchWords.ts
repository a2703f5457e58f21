import type { SetOut, State, Turn } from '#shared/bench/machine'
import { stepOf } from '#shared/bench/machine'
import type { Choice, Inline } from '#shared/lesson/schema'
import type { LessonShown } from './useLessonShown'

/** The title of a turn's step as it reads in that turn, beginning small, as after a colon. */
export function titleIn(base: LessonShown, set: SetOut, at: number): string | null {
  const turn = set.turns[at]
  if (!turn) return null
  const title = wordsOf(shownIn(base, set, turn), stepOf(set, turn).title)
  return /^[A-Z][a-z]/.test(title) ? title.charAt(0).toLowerCase() + title.slice(1) : title
}

/** The fault a wrong answer would have caused, with its cure: of the last answer to what is asked now, while that is wrong. */
export function faultOf(set: SetOut, state: State, turn: Turn, index: number): readonly Inline[] | null {
  const last = state.answers.filter(one => one.turn === turn.address && one.ask === index && one.round === state.round).at(-1)
  const planned = turn.asks[index]
  const hold = planned ? stepOf(set, turn).holds[planned.hold] : undefined
  const ask = planned ? hold?.asks[planned.ask] : undefined
  if (!last || last.right || !hold || !ask) return null
  const { answer } = last
  const choice: Choice | undefined = ask.kind === 'choices' && 'choice' in answer ? ask.choices.find(one => one.key === answer.choice) : undefined
  return choice ? choice.fault : hold.wrong
}

/** Sizes of the piece that tell it apart in the head: its metal, its wire. */
export function pieceAbout(base: LessonShown, set: SetOut): string {
  const wire = set.lesson.sizes.find(size => size.unit === 'wire' || size.unit === 'cord')
  return [set.start.material, wire ? figureText({ ...base, scope: set.scope }, wire.name) : '', set.start.practice ? 'practice' : ''].filter(Boolean).join(', ')
}
