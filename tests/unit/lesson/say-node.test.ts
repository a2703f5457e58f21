import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readExpression } from '#shared/lesson/expression'
import { sayNode } from '#shared/lesson/say-node'
import type { Node } from '#shared/lesson/schema'

const read = (text: string): Node => {
  const result = readExpression(text)
  if (!result.ok) throw new Error(`${text}: ${result.says}`)
  return result.node
}

describe('an expression as its author would write it', () => {
  it.each(['(turns + 0.5) * wire', 'bead + 2 * (neck + across)', 'first_joins != "nothing" or second_joins != "nothing"', 'not practice', 'not (a == 1 and b == 2)', 'ring(inside, wire) + 22 mm', 'a - (b - c)', 'a - b - c', '(a + b) ^ 2', 'a / (b * c)'])('%s', (text) => {
    expect(sayNode(read(text))).toBe(text)
  })

  it('read again is the same expression', () => {
    const { sum } = fc.letrec<{ sum: Node }>(tie => ({
      sum: fc.oneof({ maxDepth: 4 },
        fc.constantFrom<Node>({ k: 'name', n: 'wire' }, { k: 'num', v: 2 }, { k: 'num', v: 0.5, unit: 'mm' }),
        fc.record({ k: fc.constant('op' as const), op: fc.constantFrom('+' as const, '-' as const, '*' as const, '/' as const, '^' as const), a: tie('sum'), b: tie('sum') }),
        fc.record({ k: fc.constant('call' as const), f: fc.constant('max' as const), args: fc.tuple(tie('sum'), tie('sum')).map(args => [...args]) })),
    }))
    fc.assert(fc.property(sum, (node) => {
      fc.pre(sayNode(node).length <= 300)
      expect(read(sayNode(node))).toEqual(node)
    }))
  })
})
