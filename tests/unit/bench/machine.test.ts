import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type AnyEvent, type BenchEvent, readEvent, shaOfEvent } from '../../../shared/bench/events'
import { add, begin, choiceOrder, fold, holdPassed, may, plan, setOut, stepOf } from '../../../shared/bench/machine'
import type { Lesson } from '../../../shared/lesson/schema'
import { choices, count, hand, hold, id, lesson, measure, name, num, numbered, part, photoAsk, say, start, step, withCheck, withPhoto, withReading } from './bench-lesson'
import { Server, Tablet } from './honest'

const LINK = lesson([
  part('set-out', [step('measure', { holds: [hold([measure, count(3)])] }), step('cut')]),
  part('links', [step('bend', withReading), step('close', { holds: [hold([choices], { witness: 'below 3' })] }), step('look', { ...withCheck, ...withPhoto })], { repeat: name('links') }),
])
const LESSONS: Lesson[] = [
  LINK,
  lesson([part('one', [step('a'), step('b', { holds: [hold([photoAsk])] }), step('c', { repeat: num(2), holds: [hold([choices])] }), step('d', { waits: [{ length: { k: 'num', v: 1, unit: 'h' }, why: null, when: null, range: { from: 0, to: 0, line: 1 } }] })])]),
  lesson([part('batch', [step('first', withCheck), step('second', { holds: [hold([count(3)])] })], { repeat: num(3), order: 'step' })]),
]

function begun(of: Lesson, more = {}) {
  const piece = id()
  const maker = hand(piece, id())
  const first = say(maker, 'piece.started', start(of, more))
  maker.round = first.id
  return { piece, maker, first }
}

describe('the plan', () => {
  it('names turns by key, part turn and step turn', () => {
    const planned = plan(LINK, start(LINK))
    expect(planned.ok && planned.turns.map(turn => turn.address)).toEqual(['measure', 'cut', 'bend@1', 'close@1', 'look@1', 'bend@2', 'close@2', 'look@2'])
    const stepwise = plan(LESSONS[2] ?? LINK, start(LINK))
    expect(stepwise.ok && stepwise.turns.map(turn => turn.address)).toEqual(['first@1', 'first@2', 'first@3', 'second@1', 'second@2', 'second@3'])
    const inner = plan(LESSONS[1] ?? LINK, start(LINK))
    expect(inner.ok && inner.turns.map(turn => turn.address)).toEqual(['a', 'b', 'c@1.1', 'c@1.2', 'd'])
  })

  it('asks for a witness by the level the piece began with', () => {
    const at = (level: number) => {
      const planned = plan(LINK, start(LINK, { level }))
      return planned.ok && planned.turns.find(turn => turn.address === 'close@1')?.witness
    }
    expect([at(0), at(2), at(3)]).toEqual([true, true, false])
  })

  it('leaves the briefing out once level 1 is held', () => {
    const of = lesson([part('before', [step('why', withCheck)]), part('do', [step('cut')])])
    const addresses = (level: number) => { const planned = plan(of, start(of, { level })); return planned.ok ? planned.turns.map(turn => turn.address) : [] }
    expect(addresses(0)).toEqual(['why', 'cut'])
    expect(addresses(1)).toEqual(['cut'])
  })

  it('asks two holds of the stick of one step in the same turn, and neither again', () => {
    const of = lesson([part('links', [step('prove', { holds: [hold([choices], { once: 'stick' }), hold([choices], { once: 'stick' })] })], { repeat: num(2) })])
    const planned = plan(of, start(of))
    expect(planned.ok && planned.turns.map(turn => turn.asks.map(ask => ask.hold))).toEqual([[0, 1], []])
  })

  it('asks a hold of the stick once in a piece, and not at all when it was passed before', () => {
    const of = lesson([part('links', [step('prove', { holds: [hold([choices], { once: 'stick' })] })], { repeat: num(3) })])
    const asked = (passed: string[]) => { const planned = plan(of, start(of, { once: { passed, samples: {} } })); return planned.ok ? planned.turns.map(turn => turn.asks.length) : [] }
    expect(asked([])).toEqual([1, 0, 0])
    expect(asked(['prove'])).toEqual([0, 0, 0])
  })

  it('refuses what would be more than 2,000 turns, or none', () => {
    const many = lesson([part('p', [step('s', { repeat: num(100) })], { repeat: num(100) })])
    expect(plan(many, start(LINK))).toMatchObject({ ok: false })
    expect(plan(lesson([part('p', [step('s')], { repeat: num(0) })]), start(LINK))).toMatchObject({ ok: false })
  })
})

describe('a hold', () => {
  it('is passed by nothing but its answers, right, all of them', () => {
    const { piece, maker, first } = begun(LINK)
    const folded = begin(piece)
    add(LINK, folded, first)
    const tries = (event: BenchEvent) => { const verdict = may(folded.set, folded.state, event); if (!verdict.ok) maker.seq--; return verdict }
    expect(tries(say(maker, 'step.done', { turn: 'measure', early: false }))).toMatchObject({ ok: false, reason: 'hold-not-passed' })
    expect(tries(say(maker, 'step.done', { turn: 'cut', early: false }))).toMatchObject({ ok: false, reason: 'not-there-yet' })
    add(LINK, folded, say(maker, 'hold.answered', { turn: 'measure', ask: 0, answer: { values: ['9'], typed: ['9'], unit: 'mm', gauge: '' } }))
    expect(folded.state.misses).toEqual({ measure: 1 })
    add(LINK, folded, say(maker, 'hold.answered', { turn: 'measure', ask: 0, answer: { values: ['4.7'], typed: ['4.7'], unit: 'mm', gauge: '' } }))
    expect(tries(say(maker, 'step.done', { turn: 'measure', early: false }))).toMatchObject({ ok: false, reason: 'hold-not-passed' })
    add(LINK, folded, say(maker, 'hold.answered', { turn: 'measure', ask: 1, answer: { count: '3', typed: '3' } }))
    expect(tries(say(maker, 'step.done', { turn: 'measure', early: false }))).toEqual({ ok: true, late: false })
  })

  it('takes the tolerance of the level the piece began with', () => {
    const right = (level: number) => {
      const { piece, maker, first } = begun(LINK, { level })
      return fold(LINK, piece, numbered([first, say(maker, 'hold.answered', { turn: 'measure', ask: 0, answer: { values: ['4.7'], typed: ['4.7'], unit: 'mm', gauge: '' } })])).state.answers[0]?.right
    }
    expect([right(2), right(3)]).toEqual([true, false])
  })

  it('does not un-pass by a wrong answer afterwards', () => {
    const { piece, maker, first } = begun(LINK)
    const answer = (n: string) => say(maker, 'hold.answered', { turn: 'measure', ask: 1, answer: { count: n, typed: n } })
    const { state, set } = fold(LINK, piece, numbered([first, say(maker, 'hold.answered', { turn: 'measure', ask: 0, answer: { values: ['4.4'], typed: [''], unit: 'mm', gauge: '' } }), answer('3'), answer('5')]))
    expect(state.misses).toEqual({ measure: 1 })
    expect(set && set.turns[0] && holdPassed(state, set.turns[0])).toBe(true)
  })

  it('is not witnessed by its maker, nor by who is no instructor', () => {
    const { piece, first } = begun(LINK)
    const folded = begin(piece)
    add(LINK, folded, first)
    const other = { ...hand(piece, id()), round: first.id }
    const own = { ...hand(piece, first.actor), round: first.id }
    expect(may(folded.set, folded.state, say(own, 'hold.witnessed', { turn: 'close@1', how: 'there' }), { instructor: true })).toMatchObject({ reason: 'own-work' })
    expect(may(folded.set, folded.state, say(other, 'hold.witnessed', { turn: 'close@1', how: 'there' }), { instructor: false })).toMatchObject({ reason: 'not-an-instructor' })
  })

  it('shows its choices in another order after each miss, the same on every tablet', () => {
    const state = { piece: id(), round: id() }
    const keys = ['a', 'b', 'c', 'd', 'e']
    expect(choiceOrder(state, 'close@1', 0, keys)).toEqual(choiceOrder({ ...state }, 'close@1', 0, [...keys].reverse()))
    const orders = new Set([0, 1, 2, 3, 4, 5].map(misses => choiceOrder(state, 'close@1', misses, keys).join()))
    expect(orders.size).toBeGreaterThan(3)
    expect(choiceOrder(state, 'close@1', 0, keys).sort()).toEqual(keys)
  })
})

describe('rounds', () => {
  it('a remake undoes that turn and the later ones of its part turn, and keeps the rest', () => {
    const of = lesson([part('links', [step('bend'), step('wrap'), step('trim')], { repeat: num(2) })])
    const { piece, maker, first } = begun(of)
    const events = [first, ...['bend@1', 'wrap@1', 'trim@1', 'bend@2', 'wrap@2'].map(turn => say(maker, 'step.done', { turn, early: false }))]
    const remade = say(maker, 'turn.remade', { turn: 'wrap@1', why: 'gap' })
    const { state } = fold(of, piece, numbered([...events, remade]))
    expect(Object.keys(state.done).sort()).toEqual(['bend@1', 'bend@2', 'wrap@2'])
    expect(state.place).toBe('wrap@1')
    expect(state.round).toBe(remade.id)
    const stale = say(maker, 'step.done', { turn: 'wrap@1', early: false })
    expect(fold(of, piece, numbered([...events, remade, stale])).state.late).toEqual([stale.id])
  })
})

const picks = fc.array(fc.record({ who: fc.integer({ min: 0, max: 9 }), pick: fc.nat(10_000) }), { minLength: 1, maxLength: 90 })
const RUNS = process.env.TEST_LONG ? 1200 : 120

/** Runs two tablets of one person and an instructor against one server, in the order drawn; everything is sent at the end. */
function together(of: Lesson, acts: { who: number, pick: number }[]) {
  const piece = id()
  const maker = id()
  const server = new Server(of, piece)
  const tablets = [new Tablet(of, piece, maker), new Tablet(of, piece, maker)] as const
  const instructor = hand(piece, id())
  const first = say(tablets[0].hand, 'piece.started', start(of))
  tablets[0].hand.round = first.id
  tablets[0].unsent.push(first)
  tablets[0].send(server, 1)
  for (const tablet of tablets) tablet.pull(server)
  for (const { who, pick } of acts) {
    const tablet = tablets[pick % 2 === 0 ? 0 : 1]
    if (who < 6) tablet.act(pick)
    else if (who === 6) tablet.send(server, 1 + pick % 5)
    else if (who === 7) tablet.pull(server)
    else instruct(server, instructor, pick)
  }
  for (const tablet of tablets) tablet.send(server, tablet.unsent.length)
  for (const tablet of tablets) tablet.pull(server)
  return { server, tablets }
}

function instruct(server: Server, instructor: ReturnType<typeof hand>, pick: number): void {
  const { state, set } = server.folded
  instructor.round = state.round
  const place = state.place
  if (!set) return
  if (state.status === 'finished') {
    server.take(say(instructor, 'piece.judged', { judgement: id(), outcome: pick % 2 ? 'mend' : 'kept', remake: pick % 2 ? [set.turns[pick % set.turns.length]?.address ?? ''] : [] }))
    return
  }
  if (place) server.take(say(instructor, pick % 5 === 0 ? 'look.given' : 'hold.witnessed', (pick % 5 === 0 ? { words: null } : { turn: place, how: 'there' }) as never))
}

describe('honest tablets', () => {
  it('are never refused: whatever one allowed, the server takes, in any interleaving of two tablets and an instructor', () => {
    fc.assert(fc.property(fc.constantFrom(...LESSONS), picks, (of, acts) => {
      const { server } = together(of, acts)
      expect(server.refused).toEqual([])
    }), { numRuns: RUNS })
  })

  it('see the same state as the server once all is sent and pulled', () => {
    fc.assert(fc.property(fc.constantFrom(...LESSONS), picks, (of, acts) => {
      const { server, tablets } = together(of, acts)
      for (const tablet of tablets) expect(tablet.view().state).toEqual(server.folded.state)
    }), { numRuns: RUNS })
  })

  it('do get somewhere: over many runs pieces are finished, judged and mended', () => {
    const seen = new Set<string>()
    fc.assert(fc.property(fc.constantFrom(...LESSONS), fc.array(fc.record({ who: fc.integer({ min: 0, max: 9 }), pick: fc.nat(10_000) }), { minLength: 150, maxLength: 300 }), (of, acts) => {
      const { server } = together(of, acts)
      seen.add(server.folded.state.status)
      if (server.folded.state.rounds > 0) seen.add('another round')
      if (server.folded.state.late.length > 0) seen.add('late')
    }), { numRuns: 60, seed: 7 })
    expect([...seen]).toEqual(expect.arrayContaining(['at-bench', 'judged', 'another round', 'late']))
  })
})

describe('the fold', () => {
  it('gives one state for any order of arrival and any repeats of numbered events', () => {
    fc.assert(fc.property(fc.constantFrom(...LESSONS), picks, fc.infiniteStream(fc.nat(1000)), (of, acts, draws) => {
      const { server } = together(of, acts)
      const next = () => Number(draws.next().value)
      const shuffled = [...server.events, ...server.events.filter(() => next() % 3 === 0)].map(event => [next(), event] as const).sort((a, b) => a[0] - b[0]).map(([, event]) => event)
      expect(fold(of, server.piece, shuffled).state).toEqual(server.folded.state)
    }), { numRuns: RUNS })
  })

  it('comes out the same from a kept state that went through JSON', () => {
    fc.assert(fc.property(fc.constantFrom(...LESSONS), picks, fc.nat(100), (of, acts, cut) => {
      const { server } = together(of, acts)
      const at = cut % server.events.length
      const kept = fold(of, server.piece, server.events.slice(0, at))
      const again = { state: JSON.parse(JSON.stringify(kept.state)), set: kept.state.start ? setOut(of, kept.state.start) : null, refused: [] }
      for (const event of server.events.slice(at)) add(of, again, event)
      expect(again.state).toEqual(server.folded.state)
    }), { numRuns: RUNS })
  })

  it('never reaches past an unpassed hold, whatever list of events it is given', () => {
    fc.assert(fc.property(fc.constantFrom(...LESSONS), picks, fc.infiniteStream(fc.nat(1_000_000)), (of, acts, draws) => {
      const { server } = together(of, acts)
      const events = forge(server.events, () => Number(draws.next().value))
      const { state, set, refused } = fold(of, server.piece, events)
      if (!set) return
      for (const turn of set.turns.filter(one => state.done[one.address] !== undefined && one.asks.length > 0)) {
        expect(passedBy(of, events, refused.map(one => one.id), turn.address, stepOf(set, turn).holds.length > 0)).toBe(true)
      }
    }), { numRuns: RUNS })
  })

  it('lists a forged event with its reason and goes on with what comes after', () => {
    const { piece, maker, first } = begun(LESSONS[1] ?? LINK)
    const forged = say(maker, 'step.done', { turn: 'c@1.2', early: false })
    const good = say(maker, 'step.done', { turn: 'a', early: false })
    const { state, refused } = fold(LESSONS[1] ?? LINK, piece, numbered([first, forged, good]))
    expect(refused).toEqual([{ id: forged.id, reason: 'not-there-yet', says: expect.stringMatching(/still to be done/) }])
    expect(state.place).toBe('b')
  })
})

/** Drops, doubles and moves events, and claims steps done that were not: a list no honest tablet made. */
function forge(events: readonly AnyEvent[], draw: () => number): AnyEvent[] {
  const out = events.flatMap((event) => {
    const what = draw() % 6
    if (what === 0 && event.kind !== 'piece.started') return []
    if (what === 1 && event.kind === 'hold.answered' && 'choice' in event.body.answer) return [{ ...event, body: { ...event.body, answer: { choice: 'wrong' } } }]
    if (what === 2 && event.kind === 'hold.witnessed') return [{ ...event, actor: events[0]?.actor ?? '' }]
    return [event]
  })
  return out.map((event, i) => ({ ...event, n: i + 1 } as AnyEvent))
}

/** Told without the machine: did an answer by a person, or an instructor's release, stand before this turn was done? */
function passedBy(of: Lesson, events: readonly AnyEvent[], refused: string[], address: string, hasHold: boolean): boolean {
  if (!hasHold) return true
  const taken = events.filter(event => !refused.includes(event.id))
  const doneAt = taken.findLastIndex(event => event.kind === 'step.done' && event.body.turn === address)
  const before = taken.slice(0, doneAt).filter(event => 'turn' in event.body && event.body.turn === address)
  const maker = events[0]?.actor
  if (before.some(event => event.kind === 'hold.released' && event.actor !== maker)) return true
  const answered = before.some(event => event.kind === 'hold.answered' && isRightByHand(event.body.answer))
  const planned = plan(of, taken[0]?.kind === 'piece.started' ? taken[0].body : start(of))
  const needs = planned.ok && planned.turns.find(turn => turn.address === address)?.witness
  return answered && (!needs || before.some(event => event.kind === 'hold.witnessed' && event.actor !== maker))
}

function isRightByHand(answer: object): boolean {
  if ('choice' in answer) return answer.choice === 'right'
  if ('count' in answer) return answer.count === '3'
  if ('values' in answer && Array.isArray(answer.values)) return answer.values.every(value => Math.abs(Number(value) - 4.4) <= 0.3 + 1e-9)
  return 'photo' in answer
}

describe('an event as it is sent', () => {
  it('is refused with a member too many, a body of another kind, or an unknown kind', () => {
    const { first } = begun(LINK)
    expect(readEvent(JSON.parse(JSON.stringify(first)))).toEqual(first)
    expect(readEvent({ ...first, extra: 1 })).toBeNull()
    expect(readEvent({ ...first, kind: 'piece.finished' })).toBeNull()
    expect(readEvent({ ...first, kind: 'piece.sold' })).toBeNull()
    expect(readEvent({ ...first, body: { ...first.body, verdict: 'right' } })).toBeNull()
  })

  it('has a hash over what the tablet said and nothing the server adds', () => {
    const { first } = begun(LINK)
    expect(shaOfEvent({ ...first, n: 4, late: true } as unknown as BenchEvent)).toBe(shaOfEvent(first))
    expect(shaOfEvent({ ...first, since: 1 })).not.toBe(shaOfEvent(first))
  })
})

