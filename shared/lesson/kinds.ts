/** The kind an expression has, told from the kinds of its names, without any values. */
import { comparable, isNumberKind, kindOfCall, kindOfOperation, saysOfOperation } from './figures'
import { FUNCTION_TABLE } from './functions'
import type { Kind, Node } from './schema'
import { UNIT_TABLE } from './values'

export type Kinded = { ok: true, kind: Kind } | { ok: false, says: string, /** A name that is not known, or one whose own figure is bad (then its users are silent). */ name?: string }
/** Kinds by name; null: known, but without a value, so that whoever uses it says nothing more. */
export type Kinds = ReadonlyMap<string, Kind | null>

const no = (says: string, name?: string): Kinded => name === undefined ? { ok: false, says } : { ok: false, says, name }
const yes = (kind: Kind): Kinded => ({ ok: true, kind })

export function kindOf(node: Node, kinds: Kinds): Kinded {
  switch (node.k) {
    case 'num': return yes(node.unit ? UNIT_TABLE[node.unit].kind : Number.isInteger(node.v) ? 'count' : 'number')
    case 'text': return yes('choice')
    case 'name': { const kind = node.n === 'pi' ? 'number' : kinds.get(node.n); return kind ? yes(kind) : no(`${node.n} is no size or figure of this lesson.`, node.n) }
    case 'neg': { const a = kindOf(node.a, kinds); return !a.ok || isNumberKind(a.kind) ? a : no('Only a number can be taken away.') }
    case 'not': { const a = kindOf(node.a, kinds); return !a.ok || a.kind === 'yes_no' ? a : no('“not” wants a yes or no.') }
    case 'and': case 'or': return pair(node.a, node.b, kinds, (a, b) => a === 'yes_no' && b === 'yes_no' ? yes('yes_no') : no(`“${node.k}” wants a yes or no on both sides.`))
    case 'cmp': return pair(node.a, node.b, kinds, (a, b) => compared(node.op, a, b))
    case 'op': return pair(node.a, node.b, kinds, (a, b) => {
      const kind = kindOfOperation(node.op, a, b, node.op === '^' && node.b.k === 'num' ? node.b.v : null)
      return kind ? yes(kind) : no(saysOfOperation(node.op, a, b))
    })
    case 'call': return called(node, kinds)
  }
}

function pair(left: Node, right: Node, kinds: Kinds, join: (a: Kind, b: Kind) => Kinded): Kinded {
  const a = kindOf(left, kinds)
  if (!a.ok) return a
  const b = kindOf(right, kinds)
  return b.ok ? join(a.kind, b.kind) : b
}

function compared(op: string, a: Kind, b: Kind): Kinded {
  if (!comparable(a, b)) return no(`A ${a} and a ${b} cannot be compared.`)
  return op === '==' || op === '!=' || isNumberKind(a) ? yes('yes_no') : no('Only numbers are larger or smaller.')
}

function called(node: Extract<Node, { k: 'call' }>, kinds: Kinds): Kinded {
  const entry = FUNCTION_TABLE[node.f]
  if (!entry) return no(`${node.f} is not there yet.`)
  const args: Kind[] = []
  for (const arg of node.args) {
    const kind = kindOf(arg, kinds)
    if (!kind.ok) return kind
    args.push(kind.kind)
  }
  const gives = kindOfCall(entry.signature, args)
  return gives.ok ? yes(gives.kind) : no(`${node.f}: ${gives.says}`)
}

/** All names an expression uses. */
export function namesIn(node: Node): string[] {
  switch (node.k) {
    case 'name': return [node.n]
    case 'neg': case 'not': return namesIn(node.a)
    case 'op': case 'cmp': case 'and': case 'or': return [...namesIn(node.a), ...namesIn(node.b)]
    case 'call': return node.args.flatMap(namesIn)
    default: return []
  }
}
