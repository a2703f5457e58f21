import { placeNow } from '../../shared/bench/screen'
import { setOut, type SetOut, type State } from '../../shared/bench/machine'
import { scopeAt, stepOf } from '../../shared/bench/set-out'
import { plainText } from '../../shared/lesson/plain'
import type { Inline, Lesson } from '../../shared/lesson/schema'
import { shownValue } from '../../shared/lesson/shown'

/** A line of the lesson as it reads in one turn of a piece, in mm. */
function reads(set: SetOut, address: string, line: readonly Inline[]): string {
  const turn = set.turns[set.at.get(address) ?? -1]
  const scope = turn ? scopeAt(set, turn) : set.scope
  return plainText(line, (name, to) => { const value = scope[name]; return value ? shownValue(value, 'mm', to) : '' })
}

export interface InHand {
  /** Title of the step in hand; null when all is done. */
  step: string | null
  hold: { turn: string, consequence: string, witness: boolean, misses: number } | null
}

/** The step in hand of a piece, and the hold it stands at, in words. */
export function inHand(lesson: Lesson, state: State): InHand {
  const set = state.start ? setOut(lesson, state.start) : null
  if (!set || state.place === null) return { step: null, hold: null }
  const turn = set.turns[set.at.get(state.place) ?? -1]
  if (!turn) return { step: null, hold: null }
  const place = placeNow(set, state)
  const hold = place.kind === 'ask' || place.kind === 'witness' ? place.hold : null
  return {
    step: reads(set, turn.address, stepOf(set, turn).title),
    hold: hold ? { turn: turn.address, consequence: reads(set, turn.address, hold.consequence), witness: place.kind === 'witness', misses: state.misses[turn.address] ?? 0 } : null,
  }
}
