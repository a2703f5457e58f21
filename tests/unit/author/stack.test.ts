import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { stackNotes } from '~/utils/author/stack'

describe('notes in the margin', () => {
  it('stand beside their lines where there is room', () => {
    expect(stackNotes([{ at: 10, height: 40 }, { at: 200, height: 40 }], 8)).toEqual([10, 200])
  })

  it('stand one under the other where there is none', () => {
    expect(stackNotes([{ at: 10, height: 40 }, { at: 12, height: 40 }, { at: 14, height: 40 }], 8)).toEqual([10, 58, 106])
  })

  it('never lie on each other and never stand above their line', () => {
    const leaf = fc.record({ at: fc.nat(5000), height: fc.integer({ min: 1, max: 300 }) })
    fc.assert(fc.property(fc.array(leaf), fc.nat(20), (leaves, gap) => {
      const sorted = [...leaves].sort((a, b) => a.at - b.at)
      const tops = stackNotes(sorted, gap)
      sorted.forEach((one, index) => {
        expect(tops[index]).toBeGreaterThanOrEqual(one.at)
        if (index > 0) expect(tops[index]).toBeGreaterThanOrEqual((tops[index - 1] ?? 0) + (sorted[index - 1]?.height ?? 0) + gap)
      })
    }))
  })
})
