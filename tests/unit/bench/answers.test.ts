import { describe, expect, it } from 'vitest'
import { answers, isRight, isWithin, limitsOf } from '../../../shared/bench/answers'
import { decimal } from '../../../shared/bench/events'
import { covered, faultOfSize, valueOf } from '../../../shared/bench/scope'
import { choices, count, lesson, measure, mm, part, photoAsk, step } from './bench-lesson'

const of = lesson([part('p', [step('s')])])
const across = of.readings[0]
if (!across) throw new Error('The lesson has its reading.')

describe('limits of a reading', () => {
  it('are the middle and the tolerance of the level', () => {
    expect(limitsOf(of, across, {}, 2, {})).toMatchObject({ is: 4.4, low: 4.4 - 0.3, high: 4.4 + 0.3 })
    expect(limitsOf(of, across, {}, 3, {})).toMatchObject({ low: 4.4 - 0.2, high: 4.4 + 0.2 })
  })

  it('go by the sample of another reading, and by what that one should be while there is none', () => {
    const long = { ...across, name: 'long', is: null, sampleOf: 'across' }
    expect(limitsOf(of, long, {}, 3, { across: 21.3 })?.is).toBe(21.3)
    expect(limitsOf(of, long, {}, 3, {})?.is).toBe(4.4)
  })

  it('take a value on the limit itself, whatever doubles make of it', () => {
    const limits = limitsOf(of, across, {}, 3, {})
    expect(isWithin([4.6], across, limits)).toBe(true)
    expect(isWithin([4.2], across, limits)).toBe(true)
    expect(isWithin([4.61], across, limits)).toBe(false)
  })

  it('want as many values as are asked for, and that they agree', () => {
    const twice = { ...across, times: 2, agree: mm(0.1) }
    const limits = limitsOf(of, twice, {}, 3, {})
    expect(isWithin([4.4], twice, limits)).toBe(false)
    expect(isWithin([4.4, 4.5], twice, limits)).toBe(true)
    expect(isWithin([4.3, 4.5], twice, limits)).toBe(false)
  })
})

describe('an answer', () => {
  it('is right by its choice, its count, its measure, or the photo itself', () => {
    expect(isRight(of, choices, { choice: 'right' }, {}, 0, {})).toBe(true)
    expect(isRight(of, choices, { choice: 'wrong' }, {}, 0, {})).toBe(false)
    expect(isRight(of, count(11), { count: '11', typed: '11' }, {}, 0, {})).toBe(true)
    expect(isRight(of, count(11), { count: '10.999', typed: '' }, {}, 0, {})).toBe(false)
    expect(isRight(of, measure, { values: ['4.5'], typed: [''], unit: 'mm', gauge: '' }, {}, 3, {})).toBe(true)
    expect(isRight(of, photoAsk, { photo: '01J00000000000000000000000' }, {}, 0, {})).toBe(true)
  })

  it('of another kind than the question is none', () => {
    expect(answers(choices, { choice: 'a-choice-not-shown' })).toBe(false)
    expect(answers(count(1), { choice: 'right' })).toBe(false)
    expect(answers(measure, { count: '4', typed: '4' })).toBe(false)
  })
})

describe('sizes as told', () => {
  it('are read by their kind and refused with a sentence', () => {
    const links = of.sizes[0]
    if (!links) throw new Error('The lesson has its size.')
    expect(faultOfSize(links, undefined)).toBe('Missing: Links.')
    expect(faultOfSize(links, { value: '2.5', typed: '2.5' })).toMatch(/whole number/)
    expect(faultOfSize(links, { value: '3', typed: '3' })).toBeNull()
    expect(faultOfSize({ ...links, unit: 'choice', choices: ['nothing', 'the clasp'] }, { value: 'a cat', typed: '' })).toMatch(/choose one of/)
    expect(valueOf('', 'length')).toBeNull()
  })

  it('outside what the lesson covers are still sizes', () => {
    const links = { ...of.sizes[0], name: 'links', ask: 'Links', unit: 'count' as const, usual: 2, from: 1, to: 5, step: null, choices: [], range: { from: 0, to: 0, line: 1 } }
    expect(covered(links, { value: '5', typed: '5' })).toBe(true)
    expect(covered(links, { value: '6', typed: '6' })).toBe(false)
    expect(faultOfSize(links, { value: '6', typed: '6' })).toBeNull()
  })
})

describe('decimal text', () => {
  it('has no exponent, no trailing noughts and no minus nought', () => {
    expect([decimal(0.1 + 0.2), decimal(101.66), decimal(1e-7), decimal(-0), decimal(22)]).toEqual(['0.3', '101.66', '0.0000001', '0', '22'])
    expect(() => decimal(Number.POSITIVE_INFINITY)).toThrow(RangeError)
  })
})
