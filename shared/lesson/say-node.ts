/** An expression as its author would write it. */
import type { Node } from './schema'

/** How tightly a node binds: what binds less is put in parentheses inside what binds more. */
const TIGHT: Record<Node['k'], number> = { or: 1, and: 2, not: 3, cmp: 4, op: 5, neg: 7, num: 9, name: 9, text: 9, call: 9 }
const OF_OP = { '+': 5, '-': 5, '*': 6, '/': 6, '^': 8 } as const
/** What may stand to the right of a sign without parentheses: `1/2 in` is half an inch, so a size below a line needs them. */
const RIGHT_OF = { '+': 6, '-': 6, '*': 6.2, '/': 7, '^': 8 } as const
/** A number with its unit is a product to the reader of expressions, and binds little tighter than one. */
const tight = (node: Node): number => (node.k === 'op' ? OF_OP[node.op] : node.k === 'num' && node.unit ? 6.5 : TIGHT[node.k])

/** The text of an expression, with the parentheses it needs and no others. Read again, it is the same expression. */
export function sayNode(node: Node): string {
  const inside = (part: Node, least: number): string => (tight(part) < least ? `(${sayNode(part)})` : sayNode(part))
  switch (node.k) {
    case 'num': return node.unit ? `${node.v} ${node.unit}` : String(node.v)
    case 'name': return node.n
    case 'text': return `"${node.v}"`
    case 'neg': return `-${inside(node.a, TIGHT.neg)}`
    case 'not': return `not ${inside(node.a, TIGHT.cmp)}`
    case 'call': return `${node.f}(${node.args.map(sayNode).join(', ')})`
    case 'cmp': return `${inside(node.a, 5)} ${node.op} ${inside(node.b, 5)}`
    case 'and': case 'or': return `${inside(node.a, TIGHT[node.k])} ${node.k} ${inside(node.b, TIGHT[node.k] + 1)}`
    case 'op': return `${inside(node.a, node.op === '^' ? 9 : OF_OP[node.op])} ${node.op} ${inside(node.b, RIGHT_OF[node.op])}`
  }
}
