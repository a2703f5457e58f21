/** Reads an expression into plain nodes. mathjs only parses; it never evaluates, and the player does not load it. */
import { create, parseDependencies, type MathNode } from 'mathjs'
import { nearNames, orNear, type Code } from './findings'
import { FUNCTION_TABLE } from './functions'
import { FIGURE_UNITS, FUNCTIONS, type FunctionName, type Node } from './schema'

// The package's own types call this optional; it is always there.
const { parse } = create(parseDependencies ? { parseDependencies } : {})

export const LONGEST_EXPRESSION = 300
export const DEEPEST = 20
export type Read = { ok: true, node: Node } | { ok: false, code: Code, says: string }
const no = (says: string, code: Code = 'expression'): { ok: false, code: Code, says: string } => ({ ok: false, code, says })

const OPERATORS: Record<string, '+' | '-' | '*' | '/' | '^'> = { add: '+', subtract: '-', multiply: '*', divide: '/', pow: '^' }
const COMPARISONS: Record<string, '==' | '!=' | '<' | '<=' | '>' | '>='> = { equal: '==', unequal: '!=', smaller: '<', smallerEq: '<=', larger: '>', largerEq: '>=' }
const isUnit = (name: string): name is (typeof FIGURE_UNITS)[number] => (FIGURE_UNITS as readonly string[]).includes(name)
const isFunction = (name: string): name is FunctionName => (FUNCTIONS as readonly string[]).includes(name)

/** Reads text as an expression. Never throws; what is not of the closed list is refused with a sentence. */
export function readExpression(text: string): Read {
  const trimmed = text.trim()
  if (trimmed === '') return no('An expression is missing here.')
  if (trimmed.length > LONGEST_EXPRESSION) return no(`An expression has at most ${LONGEST_EXPRESSION} letters. Give parts of it names of their own.`)
  // Deep brackets would overflow the parser itself.
  if ((trimmed.match(/[([{]/g) ?? []).length > DEEPEST * 2 || /[;\n\r=](?<![=!<>]=)(?!=)/.test(trimmed.replace(/"[^"]*"/g, ''))) return no('This is no expression of a lesson. Write sizes, figures, numbers with units, + - * / ^ and listed functions.')
  let tree: MathNode
  try {
    tree = parse(trimmed)
  }
  catch {
    return no(`“${trimmed}” cannot be read as an expression.`)
  }
  return walk(tree, 0, false)
}

interface Shape { type: string, fn?: unknown, args?: MathNode[], implicit?: boolean, content?: MathNode, name?: string, value?: unknown }

function walk(tree: MathNode, depth: number, inComparison: boolean): Read {
  if (depth > DEEPEST) return no(`An expression goes at most ${DEEPEST} deep. Give parts of it names of their own.`)
  const node: Shape = tree
  switch (node.type) {
    case 'ParenthesisNode': return node.content ? walk(node.content, depth + 1, inComparison) : no('An empty bracket.')
    case 'ConstantNode': return constant(node.value, inComparison)
    case 'SymbolNode': return symbol(node.name ?? '')
    case 'OperatorNode': return operator(node, depth)
    case 'FunctionNode': return call(node, depth)
    case 'RelationalNode': return no('Comparisons are not chained. Write “a < b and b < c”.')
    default: return no('Only names, numbers, + - * / ^, comparisons, and or not, brackets and listed functions stand in an expression.')
  }
}

function constant(value: unknown, inComparison: boolean): Read {
  if (typeof value === 'number' && Number.isFinite(value)) return { ok: true, node: { k: 'num', v: value } }
  if (typeof value === 'string' && inComparison) return { ok: true, node: { k: 'text', v: value } }
  return no(typeof value === 'string' ? 'Text stands only in a comparison, as joins == "nothing".' : 'Only numbers and, in a comparison, text in quotes.')
}

function symbol(name: string): Read {
  if (isUnit(name) && name !== 'm' && name !== 's') return no(`${name} is a unit; it stands right behind a number.`)
  return /^[a-z][a-z0-9_]{0,30}$/.test(name) ? { ok: true, node: { k: 'name', n: name } } : no(`“${name}” is no name.`, 'bad-name')
}

function operator(node: Shape, depth: number): Read {
  const fn = String(node.fn)
  const args = node.args ?? []
  if (fn === 'unaryMinus' || fn === 'not') {
    const inner = args[0] ? walk(args[0], depth + 1, false) : no('Something is missing.')
    return !inner.ok ? inner : { ok: true, node: fn === 'not' ? { k: 'not', a: inner.node } : { k: 'neg', a: inner.node } }
  }
  const [left, right] = args
  if (!left || !right || args.length !== 2) return no('This sign is not used in a lesson.')
  if (fn === 'multiply' && node.implicit) return withUnit(left, right, depth)
  const comparison = COMPARISONS[fn]
  const a = walk(left, depth + 1, comparison !== undefined)
  if (!a.ok) return a
  const b = walk(right, depth + 1, comparison !== undefined)
  if (!b.ok) return b
  if (comparison) return { ok: true, node: { k: 'cmp', op: comparison, a: a.node, b: b.node } }
  if (fn === 'and' || fn === 'or') return { ok: true, node: { k: fn, a: a.node, b: b.node } }
  const op = OPERATORS[fn]
  return op ? { ok: true, node: { k: 'op', op, a: a.node, b: b.node } } : no('This sign is not used in a lesson. There is + - * / ^.')
}

/** The one product without a sign: a number right before its unit. */
function withUnit(left: MathNode, right: MathNode, depth: number): Read {
  const number = walk(left, depth + 1, false)
  const unit: Shape = right
  if (number.ok && unit.type === 'SymbolNode' && unit.name && isUnit(unit.name)) {
    const value = plainNumber(number.node)
    if (value !== null) return { ok: true, node: { k: 'num', v: value, unit: unit.name } }
  }
  return no('Write * for a product. Only a number stands right before its unit, as 22 mm.')
}

function plainNumber(node: Node): number | null {
  if (node.k === 'num' && !node.unit) return node.v
  if (node.k === 'op' && node.op === '/' && node.a.k === 'num' && node.b.k === 'num' && !node.a.unit && !node.b.unit && node.b.v !== 0) return node.a.v / node.b.v
  return null
}

function call(node: Shape, depth: number): Read {
  const named: { name?: unknown } = typeof node.fn === 'object' && node.fn !== null ? node.fn : {}
  const name = typeof named.name === 'string' ? named.name : ''
  if (!isFunction(name)) return no(`There is no function “${name.slice(0, 40)}”.${orNear(nearNames(name, FUNCTIONS))}`, 'unknown-function')
  if (!FUNCTION_TABLE[name]) return no(`${name} is not there yet. Ask for this length as a size found in copper.`, 'function-not-yet')
  const args: Node[] = []
  for (const arg of node.args ?? []) {
    const read = walk(arg, depth + 1, false)
    if (!read.ok) return read
    args.push(read.node)
  }
  return { ok: true, node: { k: 'call', f: name, args } }
}
