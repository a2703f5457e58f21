import { describe, expect, it } from 'vitest'
import { fold } from '../../../shared/bench/machine'
import type { AnyEvent } from '../../../shared/bench/events'
import { backFrom, isMet, lastShown, onFrom } from '../../../app/utils/bench/player'
import { fitted } from '../../../app/utils/bench/photo'
import { AT, hand, id, lesson, part, say, start, step, withReading } from './bench-lesson'

const picture = { pictures: [{ name: 'cut.svg', alt: [], mirror: false, range: { from: 0, to: 0, line: 1 } }] }
const of = lesson([part('all', [step('one', picture), step('two'), step('three', withReading), step('four'), step('five'), step('six'), step('seven')])])

function at(done: string[], more: (maker: ReturnType<typeof hand>) => AnyEvent[] = () => []) {
  const maker = hand(id(), id())
  const begun = say(maker, 'piece.started', start(of))
  maker.round = begun.id
  const { state, set } = fold(of, maker.piece, [begun, ...done.map(turn => say(maker, 'step.done', { turn, early: false })), ...more(maker)])
  if (!set) throw new Error('no plan')
  return { state, set }
}

describe('looking back', () => {
  it('goes back from the place to the first step and no further, and forward to the place', () => {
    const { set, state } = at(['one', 'two'])
    expect(backFrom(set, state, null)).toBe(1)
    expect(backFrom(set, state, 1)).toBe(0)
    expect(backFrom(set, state, 0)).toBeNull()
    expect(onFrom(set, state, 0)).toBe(1)
    expect(onFrom(set, state, 1)).toBeNull()
  })
  it('leads nowhere from the first step', () => {
    const { set, state } = at([])
    expect(backFrom(set, state, null)).toBeNull()
  })
})

describe('what a step asked for', () => {
  it('is met once it is there', () => {
    const need = { kind: 'reading' as const, at: 0, reading: 'across' }
    const before = at(['one', 'two'])
    const turn = before.set.turns[2]
    if (!turn) throw new Error('no turn')
    expect(isMet(before.set, before.state, turn, need, AT)).toBe(false)
    const after = at(['one', 'two'], maker => [say(maker, 'reading.taken', { turn: 'three', reading: 'across', values: ['4.4'], typed: ['4.4'], unit: 'mm', gauge: '' })])
    expect(isMet(after.set, after.state, turn, need, AT)).toBe(true)
  })
})

describe('the work beside a hold', () => {
  it('is the last picture before it, not from far back', () => {
    const { set } = at([])
    expect(lastShown(set, 2)?.step.key).toBe('one')
    expect(lastShown(set, 4)?.step.key).toBe('one')
    expect(lastShown(set, 5)).toBeNull()
    expect(lastShown(set, 0)).toBeNull()
  })
})

describe('a photo made new', () => {
  it('has its longest side at 1600 and keeps its shape; a small one stays', () => {
    expect(fitted(4000, 3000)).toEqual({ width: 1600, height: 1200 })
    expect(fitted(1000, 4000)).toEqual({ width: 400, height: 1600 })
    expect(fitted(640, 480)).toEqual({ width: 640, height: 480 })
    expect(fitted(100_000, 1)).toEqual({ width: 1600, height: 1 })
  })
})
