/** What a taken event does to the state. */
import type { BenchEvent, EventOf } from './events'
import { askKey, askOf, rightAnswer, rightReading, type SetOut, stepOf, turnsToRemake } from './set-out'
import type { State } from './state'

/** Puts one taken event into the state. Changes `state`; the caller has asked `may`. */
export function apply(set: SetOut, state: State, event: BenchEvent): void {
  switch (event.kind) {
    case 'sitting.opened': state.sitting = { tablet: event.tablet, way: event.body.way, at: event.at }; break
    case 'step.done':
      if (state.done[event.body.turn] === undefined) state.turnsDone++
      state.done[event.body.turn] ??= event.id
      if (event.body.early && !state.early.includes(event.body.turn)) state.early.push(event.body.turn)
      replace(set, state)
      break
    case 'hold.answered': applyAnswer(set, state, event); break
    case 'check.answered': applyCheck(set, state, event); break
    case 'reading.taken': {
      const { turn, reading, values, typed, unit, gauge } = event.body
      state.readings.push({ id: event.id, round: event.round, turn, reading, values, typed, unit, gauge, right: rightReading(set, state, reading, values), at: event.at })
      break
    }
    case 'photo.taken': state.photos.push({ id: event.body.photo, round: event.round, turn: event.body.turn, for: event.body.for, event: event.id, at: event.at }); break
    case 'wait.started': state.waits[askKey(event.body.turn, event.body.wait)] ??= event.body.until; break
    case 'fault.seen': state.faults.push({ turn: event.body.turn, fault: event.body.fault }); break
    case 'turn.remade':
      state.remade.push({ turn: event.body.turn, why: event.body.why, at: event.at })
      openRound(set, state, event.id, [event.body.turn])
      break
    case 'look.asked': state.look = { event: event.id, turn: event.body.turn, about: event.body.about, at: event.at }; break
    case 'look.let-go': case 'look.given': state.look = null; break
    case 'closing.cleared': if (!state.closing.includes(event.body.item)) state.closing.push(event.body.item); break
    case 'own.marked': state.own[event.body.criterion] = event.body.says; break
    case 'piece.finished': state.status = 'finished'; state.finishedAt = event.at; break
    case 'piece.put-away': state.status = 'put-away'; state.putAway = { why: event.body.why, words: event.body.words, at: event.at }; state.look = null; break
    case 'hold.witnessed': state.witnessed[event.body.turn] = { by: event.actor, how: event.body.how }; break
    case 'hold.released': state.released[event.body.turn] = { by: event.actor, words: event.body.words }; break
    case 'stop.called': state.stopped = { why: event.body.why, words: event.body.words }; break
    case 'stop.lifted': state.stopped = null; break
    case 'piece.judged': applyJudged(set, state, event); break
    case 'piece.started': case 'event.corrected': break
  }
}

function applyAnswer(set: SetOut, state: State, event: EventOf<'hold.answered'>): void {
  const { turn, ask, answer } = event.body
  const good = rightAnswer(set, state, event)
  state.answers.push({ id: event.id, turn, ask, answer, right: good, round: event.round, at: event.at })
  if (good) state.right[askKey(turn, ask)] = true
  else state.misses[turn] = (state.misses[turn] ?? 0) + 1
  const asked = set.turns[set.at.get(turn) ?? -1]
  const measured = asked ? askOf(set, asked, ask) : null
  if (measured?.kind === 'measure' && 'values' in answer) {
    state.readings.push({ id: event.id, round: event.round, turn, reading: measured.reading, ...answer, right: good, at: event.at })
  }
}

function applyCheck(set: SetOut, state: State, event: EventOf<'check.answered'>): void {
  const turn = set.turns[set.at.get(event.body.turn) ?? -1]
  const check = turn ? stepOf(set, turn).checks[event.body.check] : undefined
  const good = check?.choices.some(choice => choice.key === event.body.choice && choice.right) ?? false
  state.checked[askKey(event.body.turn, event.body.check)] ??= { choice: event.body.choice, right: good }
}

function applyJudged(set: SetOut, state: State, event: EventOf<'piece.judged'>): void {
  state.judged = { judgement: event.body.judgement, outcome: event.body.outcome }
  state.look = null
  if (event.body.outcome !== 'mend') { state.status = 'judged'; return }
  state.status = 'at-bench'
  state.finishedAt = null
  state.closing = []
  openRound(set, state, event.id, event.body.remake)
}

/** A new round: the turns named are to be done again, and what was answered for turns not yet done is asked again. */
function openRound(set: SetOut, state: State, id: string, addresses: readonly string[]): void {
  state.round = id
  state.rounds++
  state.right = {}
  state.witnessed = {}
  state.released = {}
  state.checked = {}
  for (const address of addresses) {
    for (const turn of turnsToRemake(set, address) ?? []) {
      if (state.done[turn.address] !== undefined) state.turnsDone--
      Reflect.deleteProperty(state.done, turn.address)
    }
  }
  replace(set, state)
}

function replace(set: SetOut, state: State): void {
  let index = state.place === null ? 0 : set.at.get(state.place) ?? 0
  if (index > 0 && set.turns.slice(0, index).some(turn => state.done[turn.address] === undefined)) index = 0
  while (index < set.turns.length && state.done[set.turns[index]?.address ?? ''] !== undefined) index++
  state.place = set.turns[index]?.address ?? null
}
