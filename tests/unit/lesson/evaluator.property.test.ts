/** The evaluator against an independent one: mathjs reckons the same text, which the lesson itself never lets it do. */
import fc from 'fast-check'
import { evaluate as reckon } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { readExpression } from '#shared/lesson/expression'
import { evaluate } from '#shared/lesson/figures'

const SEED = 20260501
const RUNS = process.env.TEST_LONG ? 5000 : 500

/** Arithmetic without names, at most four deep, numbers as an author writes them. */
const number = fc.oneof(fc.integer({ min: 0, max: 99 }).map(String), fc.integer({ min: 1, max: 9999 }).map(n => (n / 100).toFixed(2)))
const { text: arithmetic } = fc.letrec<{ text: string }>(tie => ({
  text: fc.oneof({ maxDepth: 4 }, number,
    fc.tuple(tie('text'), fc.constantFrom('+', '-', '*', '/'), tie('text')).map(([a, op, b]) => `${a} ${op} ${b}`),
    tie('text').map(a => `(${a})`), tie('text').map(a => `-(${a})`),
    fc.tuple(tie('text'), fc.constantFrom(1, 2, 3)).map(([a, n]) => `(${a})^${n}`),
    fc.tuple(tie('text'), tie('text')).map(([a, b]) => `max(${a}, ${b})`), fc.tuple(tie('text'), tie('text')).map(([a, b]) => `min(${a}, ${b})`)),
}))

const close = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(a), Math.abs(b))

describe('the evaluator', () => {
  it('reckons as mathjs does, and has no value where that has none', () => {
    let reckoned = 0
    fc.assert(fc.property(arithmetic, (text) => {
      const read = readExpression(text)
      if (!read.ok) return
      const theirs: unknown = reckon(text)
      const ours = evaluate(read.node, {})
      if (typeof theirs !== 'number' || !Number.isFinite(theirs)) { expect(ours.ok, text).toBe(false); return }
      // Between a nought and a hair of one the two may part: dividing by it is no arithmetic any more.
      if (!ours.ok) { expect(ours.says, text).toMatch(/finite/); return }
      reckoned++
      expect(typeof ours.value.value === 'number' && close(ours.value.value, theirs), `${text}: ${String(ours.value.value)} and ${theirs}`).toBe(true)
    }), { numRuns: RUNS, seed: SEED })
    expect(reckoned).toBeGreaterThan(RUNS / 2)
  })

  it.each([['22 mm', 22], ['1/2 in', 12.7], ['2 cm + 3 mm', 23], ['1 m / 4', 250], ['24 h', 86400], ['90 deg', 90], ['500 mg', 0.5], ['10 N', 10], ['(2 mm + 1 mm) * 2 mm', 6], ['sqrt(4 mm * 9 mm)', 6],
    ['nearest(22.4 mm, 5 mm)', 20], ['up(20.1 mm, 5 mm)', 25], ['up(0.3, 0.1)', 0.3], ['down(24.9 mm, 5 mm)', 20], ['-2^2', -4], ['2^3^2', 512], ['10 - 4 - 3', 3], ['12 / 3 / 2', 2]])('%s is %d in base units', (text, value) => {
    const read = readExpression(text)
    const worked = read.ok ? evaluate(read.node, {}) : read
    expect(worked.ok ? worked.value.value : worked.says).toBeCloseTo(value, 9)
  })

  it.each(['2 turns', '20 mm in', 'a b', '2(3)', '1 < 2 < 3', 'f(x) = 2', '[1, 2]', 'x = 3', '1:3', 'a.b', 'sin(1)', '"text"', '2!', '5 % 3', '1 ? 2 : 3', '__proto__', 'constructor("x")', 'e1 mm', 'zeros(9)', '', '(', '1e999'])('%s is refused and never reckoned', (text) => {
    expect(readExpression(text).ok).toBe(false)
  })

  it('has no value, and a reason, for anything unknown or of the wrong kind', () => {
    for (const text of ['wire', '1 / 0', '2 mm + 3 g', 'not 3', 'true_thing and 1', '0 - "a" == 1', 'constructor', '2 ^ (1 mm)', 'sqrt(0 - 1)', 'nearest(3, 0)']) {
      const read = readExpression(text)
      const worked = read.ok ? evaluate(read.node, {}) : read
      expect(worked.ok, text).toBe(false)
      expect(worked.ok ? '' : worked.says).toMatch(/\.$/)
    }
  })
})
