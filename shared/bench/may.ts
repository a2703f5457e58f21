/** Whether an event is taken. Only facts that can be added are asked for, so that more facts never make an act impossible. */
import { answers } from './answers'
import { type BenchEvent, isMakerKind } from './events'
import type { Turn } from './plan'
import { askOf, missing, placeIndex, type SetOut, stepOf, turnsToRemake } from './set-out'
import { type Reason, REASON_SAYS } from './reasons'
import type { State } from './state'

export type Verdict = { ok: true, late: boolean } | { ok: false, reason: Reason, says: string }
export interface Facts { /** Does the actor hold instructor in this studio now? Asked at arrival; what is stored was asked then. */ instructor?: boolean }

export const no = (reason: Reason): Verdict => ({ ok: false, reason, says: REASON_SAYS[reason] })
const yes: Verdict = { ok: true, late: false }
const late: Verdict = { ok: true, late: true }

/** Whether an event is taken, and whether with effect. `set` is null before `piece.started`. */
export function may(set: SetOut | null, state: State, event: BenchEvent, facts: Facts = {}): Verdict {
  if (event.kind === 'piece.started') return state.status === 'none' ? yes : no('begun-already')
  if (!set || state.status === 'none') return no('unknown-piece')
  if (!isMakerKind(event.kind)) return mayInstructor(set, state, event, facts)
  if (event.actor !== state.maker) return no('maker-only')
  const shape = knows(set, state, event)
  if (shape) return no(shape)
  if (state.status !== 'at-bench' || event.round !== state.round) return late
  return mayMaker(set, state, event)
}

function mayInstructor(set: SetOut, state: State, event: BenchEvent, facts: Facts): Verdict {
  if (event.actor === state.maker) return no('own-work')
  if (facts.instructor === false) return no('not-an-instructor')
  if ((event.kind === 'hold.witnessed' || event.kind === 'hold.released') && !set.at.has(event.body.turn)) return no('unknown-turn')
  if (event.kind === 'piece.judged') {
    if (state.status === 'judged' || state.status === 'put-away') return late
    if (state.status !== 'finished') return no('not-finished')
    return event.body.remake.every(turn => turnsToRemake(set, turn) !== null) ? yes : no('unknown-turn')
  }
  if ((event.kind === 'hold.witnessed' || event.kind === 'hold.released') && (state.status !== 'at-bench' || event.round !== state.round)) return late
  return yes
}

/** What is wrong with an event whatever else has happened: it names what the piece has not. */
function knows(set: SetOut, state: State, event: BenchEvent): Reason | null {
  const named = 'turn' in event.body && typeof event.body.turn === 'string' && event.kind !== 'turn.remade' ? event.body.turn : null
  const turn = named === null ? null : set.turns[set.at.get(named) ?? -1]
  if (named !== null && !turn) return 'unknown-turn'
  switch (event.kind) {
    case 'hold.answered': {
      const ask = turn ? askOf(set, turn, event.body.ask) : null
      if (!ask) return 'unknown-ask'
      return answers(ask, event.body.answer) ? null : 'unknown-answer'
    }
    case 'check.answered': {
      const check = turn && turn.checks.includes(event.body.check) ? stepOf(set, turn).checks[event.body.check] : null
      if (!check) return 'unknown-ask'
      return check.choices.some(choice => choice.key === event.body.choice) ? null : 'unknown-answer'
    }
    case 'wait.started': return turn?.waits.includes(event.body.wait) ? null : 'unknown-ask'
    case 'reading.taken': return set.lesson.readings.some(reading => reading.name === event.body.reading) ? null : 'unknown-key'
    case 'closing.cleared': return set.lesson.closing.some(item => item.key === event.body.item) ? null : 'unknown-key'
    case 'own.marked': return set.lesson.criteria.some(criterion => criterion.key === event.body.criterion) ? null : 'unknown-key'
    case 'fault.seen': return knowsFault(set, turn ?? null, event.body.fault) ? null : 'unknown-key'
    case 'turn.remade': return turnsToRemake(set, event.body.turn) ? null : 'unknown-turn'
    default: return null
  }
}

const knowsFault = (set: SetOut, turn: Turn | null, key: string): boolean =>
  set.lesson.faults.some(fault => fault.key === key) || (turn !== null && stepOf(set, turn).faults.some(fault => fault.key === key))

function mayMaker(set: SetOut, state: State, event: BenchEvent): Verdict {
  const place = placeIndex(set, state)
  const named = 'turn' in event.body && typeof event.body.turn === 'string' && event.kind !== 'turn.remade' ? set.at.get(event.body.turn) ?? null : null
  if (named !== null && named > place) return no('not-there-yet')
  switch (event.kind) {
    case 'step.done': {
      const turn = set.turns[named ?? -1]
      if (!turn || state.done[turn.address]) return yes
      const lacks = missing(set, state, turn)
      return lacks ? no(lacks) : yes
    }
    case 'hold.answered': return 'photo' in event.body.answer && !hasPhoto(state, event.body.answer.photo) ? no('unknown-photo') : yes
    case 'turn.remade': return (turnsToRemake(set, event.body.turn) ?? []).some(turn => state.done[turn.address]) ? yes : no('not-done')
    case 'piece.finished':
      if (state.place !== null) return no('turns-left')
      return set.lesson.closing.every(item => state.closing.includes(item.key)) ? yes : no('closing-left')
    default: return yes
  }
}

const hasPhoto = (state: State, id: string): boolean => state.photos.some(photo => photo.id === id)
