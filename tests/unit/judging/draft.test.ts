import { describe, expect, it } from 'vitest'
import { draftGates, lookedAt, mayRest, newDraft, stillMissing, withFault, withMark, withMeasure, withOutcome, withRest, withSeen, type Draft } from '#shared/judging/draft'
import { linesOf } from '#shared/judging/marks'
import { facts, piece as evidence, TODAY } from './facts'
import { judged, lesson, outOf, state, taken } from './lesson'

const HEAD = '0'.repeat(64)
const criteria = [judged('plane'), judged('bead', { essential: true }), judged('turns'), judged('loop', { by: 'measure', reading: 'first' }), judged('safe', { essential: true, live: true })]
const lines = linesOf(outOf(lesson({ criteria })), state({ readings: [taken('first', [4.4])] }))
const bare = { piece: '4', label: 'DEV-WL-4', day: TODAY, covered: true, misses: 0 }
const gatesOf = (draft: Draft) => draftGates(draft, lines, facts({ before: [evidence('1', '2026-02-10')] }), bare)
const missing = (draft: Draft, awaited = 0) => stillMissing(draft, lines, HEAD, awaited, gatesOf(draft)).map(one => one.key)
const marked = withMeasure(withMark(withMark(newDraft('d'), 'bead', 'yes'), 'safe', 'yes'), 'loop', '4.5')
const whole: Draft = { ...withSeen(withOutcome(marked, 'kept'), lines, 'holds'), level: 3 }

describe('a judgement being made', () => {
  it('begins with nothing said, and lists all that is missing', () => {
    expect(newDraft('d')).toMatchObject({ marks: {}, seen: null, outcome: null })
    expect(missing(newDraft('d'))).toEqual(['bead', 'loop', 'safe', 'outcome', 'seen'])
    expect(missing(whole)).toEqual([])
  })
  it('marks a line, changes it, and takes it back when it is said again', () => {
    const once = withMark(newDraft('d'), 'plane', 'nearly')
    expect(once.marks).toEqual({ plane: { says: 'nearly' } })
    expect(withMark(once, 'plane', 'no').marks).toEqual({ plane: { says: 'no' } })
    expect(withMark(once, 'plane', 'nearly').marks).toEqual({})
    expect(withMeasure(marked, 'loop', ' ').marks.loop).toBeUndefined()
  })
  it('lets the rest be yes only when each essential line is marked, and never marks one so', () => {
    expect(mayRest(newDraft('d'), lines)).toBe(false)
    expect(withRest(newDraft('d'), lines)).toEqual(newDraft('d'))
    const rested = withRest(marked, lines)
    expect(rested.marks).toEqual({ ...marked.marks, plane: { says: 'yes', rest: true }, turns: { says: 'yes', rest: true } })
    expect(mayRest(rested, lines)).toBe(false)
  })
  it('takes back what could not be seen when only the piece was', () => {
    expect(Object.keys(withSeen(marked, lines, 'piece').marks)).toEqual(['bead', 'loop'])
    expect(Object.keys(withSeen(marked, lines, 'whole').marks)).toEqual(['bead', 'safe', 'loop'])
  })
  it('changes no level when the piece is not kept, and asks why and from where', () => {
    expect(withOutcome(whole, 'sent-back').level).toBeNull()
    expect(missing(withOutcome(whole, 'sent-back'))).toEqual(['words'])
    expect(missing(withOutcome(whole, 'mend'))).toEqual(['words', 'remake'])
    expect(missing({ ...withOutcome(whole, 'mend'), words: 'Tail.', remake: ['turns'] })).toEqual([])
    expect(withOutcome({ ...whole, remake: ['turns'] }, 'kept').remake).toEqual([])
  })
  it('points to faults: because and do come into the words, and go again', () => {
    const fault = { key: 'gap', sees: 'A gap', because: 'the turns crept', do: 'Push them down.' }
    const pointed = withFault({ ...whole, words: 'Better.' }, fault)
    expect(pointed).toMatchObject({ faults: ['gap'], words: 'Better.\nA gap: the turns crept. Push them down.' })
    expect(withFault(pointed, fault)).toMatchObject({ faults: [], words: 'Better.' })
  })
  it('says when a level that was chosen is no longer open', () => {
    const spoilt = withMark(whole, 'bead', 'no')
    expect(stillMissing(spoilt, lines, HEAD, 0, gatesOf(spoilt)).map(one => one.says)).toEqual(['Level 3 is not open. Essential: “Line bead” is marked no.'])
  })
  it('waits for photos, unless the piece is in the hand', () => {
    expect(missing(whole, 2)).toEqual(['photos'])
    expect(missing({ ...whole, inHand: true }, 2)).toEqual([])
  })
  it('counts what was looked at: a measure of the maker’s counts, but for the one asked for again', () => {
    expect(lookedAt(newDraft('d'), lines, 'loop')).toEqual({ done: 0, all: 5 })
    expect(lookedAt(newDraft('d'), lines, null)).toEqual({ done: 1, all: 5 })
    expect(lookedAt(marked, lines, 'loop')).toEqual({ done: 3, all: 5 })
    expect(lookedAt({ ...marked, seen: 'piece' }, lines, 'loop').all).toBe(4)
  })
  it('names unmarked essential lines together', () => {
    expect(gatesOf(newDraft('d')).find(gate => gate.level === 3)?.reasons[0]?.says).toBe('2 essential lines are not marked yet.')
  })
})
