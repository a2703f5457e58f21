import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { shownLength, shownReading, shownValue } from '../../../shared/lesson/shown'

describe('a length as it is shown', () => {
  it('has three figures at most', () => {
    expect([0.7, 2.1, 4.449, 44.83, 101.69, 99.96].map(mm => shownLength(mm, 'mm'))).toEqual(['0.7 mm', '2.1 mm', '4.45 mm', '44.8 mm', '102 mm', '100 mm'])
  })
  it('is rounded to the nearest that is asked for, with its places', () => {
    expect(shownLength(44.83, 'mm', 0.5)).toBe('45.0 mm')
    expect(shownLength(44.7, 'mm', 0.5)).toBe('44.5 mm')
    expect(shownLength(21.04, 'mm', 0.1)).toBe('21.0 mm')
    expect(shownLength(102.3, 'mm', 1)).toBe('102 mm')
    expect(shownLength(2.881, 'mm', 0.05)).toBe('2.90 mm')
  })
  it('is told in inches to the nearest 64th, or in both', () => {
    // 1 in = 25.4 mm exactly (International yard and pound agreement, 1959; from memory).
    expect(shownLength(25.4, 'in')).toBe('1 in')
    expect(shownLength(7.9375, 'in')).toBe('5/16 in')
    expect(shownLength(7.9375, 'both')).toBe('7.94 mm (5/16 in)')
  })
  it('never differs from the value by more than half of what it is rounded to', () => {
    fc.assert(fc.property(fc.double({ min: 0.01, max: 5000, noNaN: true }), fc.constantFrom(0.05, 0.1, 0.5, 1), (mm, to) => {
      expect(Math.abs(Number.parseFloat(shownLength(mm, 'mm', to)) - mm)).toBeLessThanOrEqual(to / 2 + 1e-6)
      expect(Math.abs(Number.parseFloat(shownLength(mm, 'mm')) - mm)).toBeLessThanOrEqual(Math.max(0.005, mm / 180) + 1e-9)
    }))
  })
})

describe('other values', () => {
  it('reads halves and quarters as the bench says them', () => {
    expect([2.5, 0.75, 3, 1.25, 2.3].map(value => shownValue({ kind: 'number', value }))).toEqual(['2½', '¾', '3', '1¼', '2.3'])
  })
  it('carries its unit', () => {
    expect(shownValue({ kind: 'mass', value: 0.3492 })).toBe('0.35 g')
    expect(shownValue({ kind: 'angle', value: 90 })).toBe('90°')
    expect(shownValue({ kind: 'force', value: 10 })).toBe('10 N')
    expect(shownValue({ kind: 'count', value: 7 })).toBe('7')
    expect([86_400, 5400, 600, 45].map(value => shownValue({ kind: 'time', value }))).toEqual(['24 h', '1.5 h', '10 min', '45 s'])
    expect(shownValue({ kind: 'metal', value: 'copper' })).toBe('copper')
    expect(shownValue({ kind: 'yes_no', value: false })).toBe('no')
  })
  it('shows a reading as it was measured', () => {
    expect(shownReading(4.4, 'mm')).toBe('4.4 mm')
    expect(shownReading(11, 'count')).toBe('11')
    expect(shownReading(4.4, 'mm', 'both')).toBe('4.4 mm (11/64 in)')
  })
})
