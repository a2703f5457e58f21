import fc from 'fast-check'
import { expect, it } from 'vitest'
import { lanesOf } from '../../../app/utils/lanes'

it('what fits stays on the wire, what does not hangs below', () => {
  expect(lanesOf([0, 10, 40, 41, 100], 32)).toEqual([0, 1, 0, 2, 0])
  expect(lanesOf([], 32)).toEqual([])
})
it('no two in one lane are nearer than the gap, and all are there', () => {
  fc.assert(fc.property(fc.array(fc.integer({ min: 0, max: 700 }), { maxLength: 60 }), (some) => {
    const places = [...some].sort((a, b) => a - b)
    const lanes = lanesOf(places, 32)
    expect(lanes).toHaveLength(places.length)
    for (let i = 0; i < places.length; i++) for (let j = 0; j < i; j++) if (lanes[i] === lanes[j]) expect((places[i] ?? 0) - (places[j] ?? 0)).toBeGreaterThanOrEqual(32)
  }))
})
