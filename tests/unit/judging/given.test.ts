import { describe, expect, it } from 'vitest'
import { isMet } from '#shared/judging/evidence'
import { evidenceLines, type Marks, missingMarks, outsideLines, readMeasure, wrongMarks } from '#shared/judging/given'
import { linesOf } from '#shared/judging/marks'
import { judged, lesson, outOf, state, taken } from './lesson'

const HEAD = '0'.repeat(64)
const criteria = [judged('bead', { essential: true }), judged('plane'), judged('loop', { by: 'measure', reading: 'first', essential: true }), judged('safe', { essential: true, live: true })]
const lines = (values: number[] = [4.4]) => linesOf(outOf(lesson({ criteria })), state({ readings: values.length > 0 ? [taken('first', values)] : [] }))
const keys = (faults: { key: string }[]) => faults.map(fault => fault.key)
const all: Marks = { bead: { says: 'yes' }, loop: { value: '4.5' }, safe: { says: 'yes' } }

describe('marks that are given', () => {
  it('fit the kind of line', () => {
    expect(wrongMarks(lines(), all, 'holds')).toEqual([])
    expect(keys(wrongMarks(lines(), { bead: { value: '4.4' } }, 'holds'))).toEqual(['bead'])
    expect(keys(wrongMarks(lines(), { loop: { says: 'yes' } }, 'holds'))).toEqual(['loop'])
    expect(keys(wrongMarks(lines(), { loop: { value: 'about 4' } }, 'holds'))).toEqual(['loop'])
    expect(keys(wrongMarks(lines(), { bead: {}, other: { says: 'yes' } }, 'holds'))).toEqual(['bead', 'other'])
  })
  it('leave what is seen live alone when it was not', () => {
    expect(wrongMarks(lines(), { safe: { says: 'yes' } }, 'whole')).toEqual([])
    for (const seen of ['piece', 'photo'] as const) expect(keys(wrongMarks(lines(), { safe: { says: 'yes' } }, seen))).toEqual(['safe'])
  })
  it('say "the rest are yes" of no essential line, and nothing but yes', () => {
    expect(wrongMarks(lines(), { plane: { says: 'yes', rest: true } }, 'holds')).toEqual([])
    expect(keys(wrongMarks(lines(), { bead: { says: 'yes', rest: true } }, 'holds'))).toEqual(['bead'])
    expect(keys(wrongMarks(lines(), { plane: { says: 'no', rest: true } }, 'holds'))).toEqual(['plane'])
  })
})

describe('marks that are missing', () => {
  it('are the essential ones and the measure asked for again', () => {
    expect(keys(missingMarks(lines(), {}, 'holds', 'kept', HEAD))).toEqual(['bead', 'loop', 'safe'])
    expect(missingMarks(lines(), all, 'holds', 'kept', HEAD)).toEqual([])
  })
  it('are not those that could not be seen', () => {
    expect(keys(missingMarks(lines(), {}, 'piece', 'kept', HEAD))).toEqual(['bead', 'loop'])
    expect(keys(missingMarks(lines(), {}, 'photo', 'kept', HEAD))).toEqual(['bead'])
  })
  it('ask for no measure when the piece goes back, and for the maker’s missing one when it is kept', () => {
    expect(keys(missingMarks(lines([]), { bead: { says: 'no' }, safe: { says: 'yes' } }, 'holds', 'sent-back', HEAD))).toEqual([])
    expect(keys(missingMarks(lines([]), { bead: { says: 'yes' }, safe: { says: 'yes' } }, 'holds', 'kept', HEAD))).toEqual(['loop'])
  })
})

describe('what marks say for a level', () => {
  it('a measure by the judge stands for the maker’s', () => {
    const loop = (values: number[], marks: Marks) => evidenceLines(lines(values), marks).find(line => line.key === 'loop')
    expect(isMet(loop([4.4], {}) ?? fail(), 4)).toBe(true)
    expect(isMet(loop([4.4], { loop: { value: '4.7' } }) ?? fail(), 4)).toBe(false)
    expect(isMet(loop([4.4], { loop: { value: '4,7' } }) ?? fail(), 2)).toBe(true)
    expect(isMet(loop([], {}) ?? fail(), 4)).toBe(false)
  })
  it('nearly is not met, and not no', () => {
    const [bead] = evidenceLines(lines(), { bead: { says: 'nearly' } })
    expect(isMet(bead ?? fail(), 3)).toBe(false)
    expect(outsideLines(evidenceLines(lines(), { bead: { says: 'nearly' } }), 4)).toEqual([])
    expect(keys(outsideLines(evidenceLines(lines(), { plane: { says: 'no' }, loop: { value: '9' } }), 4))).toEqual(['plane', 'loop'])
  })
})

describe('a typed measure', () => {
  it('takes a point or a comma and nothing else', () => {
    expect(['4.4', '4,4', ' 4 ', '0.25'].map(readMeasure)).toEqual([4.4, 4.4, 4, 0.25])
    expect(['', '-4', '4.4 mm', '1e3', '4.', '.5', '4.44444'].map(readMeasure)).toEqual([null, null, null, null, null, null, null])
  })
})

function fail(): never {
  throw new Error('There is no such line.')
}
