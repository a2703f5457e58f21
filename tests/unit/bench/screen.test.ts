import { describe, expect, it } from 'vitest'
import type { AnyEvent } from '../../../shared/bench/events'
import { fold, setOut } from '../../../shared/bench/machine'
import { choicesShown, needsOf, placeNow, turnSays, waitSeconds, wireOf } from '../../../shared/bench/screen'
import type { Lesson } from '../../../shared/lesson/schema'
import { AT, choices, count, hand, hold, id, lesson, name, num, part, say, start, step, withCheck, withPhoto, withReading } from './bench-lesson'

const range = { from: 0, to: 0, line: 1 }
const waits = { waits: [{ length: { k: 'num' as const, v: 10, unit: 'min' as const }, why: null, when: null, range }] }

function piece(of: Lesson, more: Parameters<typeof start>[1] = {}) {
  const maker = hand(id(), id())
  const events: AnyEvent[] = []
  const put: (...told: Parameters<typeof say> extends [unknown, ...infer Rest] ? Rest : never) => void = (kind, body, own) => {
    const event = say(maker, kind, body, own)
    if (kind === 'piece.started') maker.round = event.id
    events.push(event)
  }
  put('piece.started', start(of, more))
  const now = () => {
    const { state, set } = fold(of, maker.piece, events)
    if (!set) throw new Error('no plan')
    return { state, set, place: placeNow(set, state) }
  }
  return { put, now, maker, events }
}

describe('the place', () => {
  const held = lesson([part('all', [step('cut', { holds: [hold([count(3), choices], { witness: 'below 3' })] }), step('file')])])
  it('asks each question of a hold in turn, then waits for who looks, then shows the step', () => {
    const { put, now, maker, events } = piece(held)
    expect(now().place).toMatchObject({ kind: 'ask', index: 0 })
    put('hold.answered', { turn: 'cut', ask: 0, answer: { count: '4', typed: '4' } })
    expect(now().place).toMatchObject({ kind: 'ask', index: 0 })
    put('hold.answered', { turn: 'cut', ask: 0, answer: { count: '3', typed: '3' } })
    expect(now().place).toMatchObject({ kind: 'ask', index: 1 })
    put('hold.answered', { turn: 'cut', ask: 1, answer: { choice: 'right' } })
    expect(now().place).toMatchObject({ kind: 'witness' })
    const instructor = { ...hand(maker.piece, id()), round: maker.round }
    events.push(say(instructor, 'hold.witnessed', { turn: 'cut', how: 'there' }))
    expect(now().place).toMatchObject({ kind: 'step', turn: { address: 'cut' } })
  })
  it('goes past a hold that was released', () => {
    const { now, maker, events } = piece(held)
    events.push(say({ ...hand(maker.piece, id()), round: maker.round }, 'hold.released', { turn: 'cut', words: id() }))
    expect(now().place).toMatchObject({ kind: 'step' })
  })
  it('comes to the closing list, and is over when finished', () => {
    const { put, now } = piece(lesson([part('all', [step('file')])]))
    put('step.done', { turn: 'file', early: false })
    expect(now().place).toEqual({ kind: 'closing' })
    put('closing.cleared', { item: 'tools-back' })
    put('piece.finished', {})
    expect(now().place).toEqual({ kind: 'over', why: 'finished' })
  })
  it('is stopped while it is stopped', () => {
    const { now, maker, events } = piece(held)
    events.push(say({ ...hand(maker.piece, id()), round: maker.round }, 'stop.called', { why: 'danger', words: null }))
    expect(now().place).toEqual({ kind: 'stopped' })
  })
})

describe('what a step asks for', () => {
  it('is a reading, a photo, a question and a wait, in that order, each until it is there', () => {
    const { put, now } = piece(lesson([part('all', [step('all-of-it', { ...withReading, ...withPhoto, ...withCheck, ...waits })])]))
    const kinds = () => { const { set, state } = now(); return needsOf(set, state, set.turns[0] ?? (() => { throw new Error('none') })(), AT).map(need => need.kind) }
    expect(kinds()).toEqual(['reading', 'photo', 'check', 'wait'])
    put('reading.taken', { turn: 'all-of-it', reading: 'across', values: ['9'], typed: ['9'], unit: 'mm', gauge: '' })
    expect(kinds()).toEqual(['photo', 'check', 'wait'])
    put('photo.taken', { photo: id(), turn: 'all-of-it', for: 'step', sha256: 'a'.repeat(64), bytes: 10, type: 'image/jpeg', width: 1, height: 1 })
    expect(kinds()).toEqual(['check', 'wait'])
    put('check.answered', { turn: 'all-of-it', check: 0, choice: 'wrong' })
    expect(kinds()).toEqual(['wait'])
    put('wait.started', { turn: 'all-of-it', wait: 0, until: new Date(AT + 600_000).toISOString() })
    const { set, state } = now()
    const [turn] = set.turns
    if (!turn) throw new Error('none')
    expect(needsOf(set, state, turn, AT + 599_999)).toEqual([{ kind: 'wait', at: 0, until: new Date(AT + 600_000).toISOString() }])
    expect(needsOf(set, state, turn, AT + 600_000)).toEqual([])
    expect(waitSeconds(set, turn, 0)).toBe(600)
  })
})

describe('choices', () => {
  const asked = choices.kind === 'choices' ? choices : null
  it('are all shown, once each, in an order that changes with the misses and not with the look', () => {
    if (!asked) throw new Error('choices')
    const state = { piece: id(), round: id() }
    const orders = [0, 1, 2, 3, 4, 5, 6, 7].map(misses => choicesShown(state, 'cut', misses, asked).map(choice => choice.key).join())
    for (const order of orders) expect(order.split(',').sort()).toEqual(['other', 'right', 'wrong'])
    expect(new Set(orders).size).toBeGreaterThan(1)
    expect(choicesShown(state, 'cut', 0, asked)).toEqual(choicesShown(state, 'cut', 0, asked))
  })
  it('stand as written where the lesson says so', () => {
    if (!asked) throw new Error('choices')
    expect(choicesShown({ piece: id(), round: id() }, 'cut', 0, { ...asked, fixed: true }).map(choice => choice.key)).toEqual(['right', 'wrong', 'other'])
  })
})

describe('words and wire', () => {
  const repeated = lesson([part('links', [step('turn', { repeat: num(2), say: 'loop', holds: [hold([choices])] })], { repeat: name('links'), say: 'link' })])
  it('says which of a repeat a turn is', () => {
    const set = setOut(repeated, start(repeated))
    expect(set?.turns.map(turn => turnSays(set, turn))).toEqual(['link 1 of 2, loop 1 of 2', 'link 1 of 2, loop 2 of 2', 'link 2 of 2, loop 1 of 2', 'link 2 of 2, loop 2 of 2'])
  })
  it('hangs a bead before each step with a hold, and has one thing in hand', () => {
    const { put, now } = piece(repeated)
    const things = () => { const { set, state } = now(); return wireOf(set, state, set.at.get(state.place ?? '') ?? 0) }
    expect(things()).toHaveLength(8)
    expect(things().filter(thing => thing.here)).toEqual([{ kind: 'hold', at: 0, done: false, here: true }])
    put('hold.answered', { turn: 'turn@1.1', ask: 0, answer: { choice: 'right' } })
    expect(things().filter(thing => thing.here)).toEqual([{ kind: 'step', at: 0, done: false, here: true }])
    expect(things()[0]).toMatchObject({ kind: 'hold', done: true })
  })
  it('shows the step looked back at as the one in hand', () => {
    const { put, now } = piece(repeated)
    put('hold.answered', { turn: 'turn@1.1', ask: 0, answer: { choice: 'right' } })
    put('step.done', { turn: 'turn@1.1', early: false })
    const { set, state } = now()
    expect(wireOf(set, state, 0).filter(thing => thing.here)).toEqual([{ kind: 'step', at: 0, done: true, here: true }])
  })
})
