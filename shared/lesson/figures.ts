/**
 * The one evaluator of the lesson language, over (value, kind). It runs in the player, on the server and in print; the
 * parser is not needed here. It never throws: what has no value says why in a sentence.
 */
import { FUNCTION_TABLE, type Signature } from './functions'
import type { Kind, Lesson, Node, SizeUnit, SizeValue } from './schema'
import { type NumberKind, type Result, type Scope, UNIT_TABLE, type Value } from './values'

export type { NumberKind, Result, Scope, Value } from './values'

const no = (says: string): { ok: false, says: string } => ({ ok: false, says })
const number = (kind: NumberKind, value: number): Result => Number.isFinite(value) ? { ok: true, value: { kind, value } as Value } : no('This has no finite value.')
const truth = (value: boolean): Result => ({ ok: true, value: { kind: 'yes_no', value } })
export const isNumberKind = (kind: Kind): kind is NumberKind => kind !== 'metal' && kind !== 'choice' && kind !== 'yes_no'

/** The value of an expression, or why it has none. */
export function evaluate(node: Node, scope: Scope): Result {
  switch (node.k) {
    case 'num': { const unit = node.unit ? UNIT_TABLE[node.unit] : null; return number(unit?.kind ?? (Number.isInteger(node.v) ? 'count' : 'number'), node.v * (unit?.base ?? 1)) }
    case 'text': return { ok: true, value: { kind: 'choice', value: node.v } }
    case 'name': return named(node.n, scope)
    case 'neg': return negated(node.a, scope)
    case 'op': return both(node.a, node.b, scope, (a, b) => operate(node.op, a, b))
    case 'cmp': return both(node.a, node.b, scope, (a, b) => compare(node.op, a, b))
    case 'and': case 'or': return either(node, scope)
    case 'not': { const a = evaluate(node.a, scope); return !a.ok ? a : a.value.kind === 'yes_no' ? truth(!a.value.value) : no('“not” wants a yes or no.') }
    case 'call': return called(node, scope)
  }
}

function named(name: string, scope: Scope): Result {
  if (Object.hasOwn(scope, name)) { const value = scope[name]; if (value) return { ok: true, value } }
  return name === 'pi' ? number('number', Math.PI) : no(`${name} has no value here.`)
}

function negated(of: Node, scope: Scope): Result {
  const a = evaluate(of, scope)
  if (!a.ok) return a
  return isNumberKind(a.value.kind) && typeof a.value.value === 'number' ? number(a.value.kind, -a.value.value) : no('Only a number can be taken away.')
}

function both(left: Node, right: Node, scope: Scope, work: (a: Value, b: Value) => Result): Result {
  const a = evaluate(left, scope)
  if (!a.ok) return a
  const b = evaluate(right, scope)
  return b.ok ? work(a.value, b.value) : b
}

/** The second side is not looked at when the first decides, so that a guard may stand before what it guards. */
function either(node: { k: 'and' | 'or', a: Node, b: Node }, scope: Scope): Result {
  const a = evaluate(node.a, scope)
  if (!a.ok) return a
  if (a.value.kind !== 'yes_no') return no(`“${node.k}” wants a yes or no on both sides.`)
  if (a.value.value === (node.k === 'or')) return a
  const b = evaluate(node.b, scope)
  return b.ok && b.value.kind !== 'yes_no' ? no(`“${node.k}” wants a yes or no on both sides.`) : b
}

function operate(op: '+' | '-' | '*' | '/' | '^', a: Value, b: Value): Result {
  if (typeof a.value !== 'number' || typeof b.value !== 'number') return no('Only numbers are reckoned with.')
  const kind = kindOfOperation(op, a.kind, b.kind, op === '^' ? b.value : null)
  if (!kind) return no(saysOfOperation(op, a.kind, b.kind))
  const { value: x } = a
  const { value: y } = b
  const value = op === '+' ? x + y : op === '-' ? x - y : op === '*' ? x * y : op === '/' ? x / y : x ** y
  return number(kind === 'count' && !Number.isInteger(value) ? 'number' : kind, value)
}

const plain = (kind: Kind): boolean => kind === 'number' || kind === 'count'

/** The kind of a result, or null where the kinds do not go together. `power` is the value of an exponent where it is known. */
export function kindOfOperation(op: '+' | '-' | '*' | '/' | '^', a: Kind, b: Kind, power: number | null): NumberKind | null {
  if (!isNumberKind(a) || !isNumberKind(b)) return null
  if (op === '+' || op === '-') return a === b ? a : plain(a) && plain(b) ? 'number' : null
  if (op === '*') return plain(a) ? (plain(b) ? (a === b ? a : 'number') : b) : plain(b) ? a : a === 'length' && b === 'length' ? 'area' : null
  if (op === '/') return plain(b) ? (plain(a) ? 'number' : a) : a === b ? 'number' : a === 'area' && b === 'length' ? 'length' : null
  if (!plain(b)) return null
  return plain(a) ? (a === 'count' && b === 'count' && (power === null || power >= 0) ? 'count' : 'number') : a === 'length' && power === 2 ? 'area' : power === 1 ? a : null
}

export const saysOfOperation = (op: string, a: Kind, b: Kind): string => op === '+' || op === '-'
  ? `A ${a} and a ${b} cannot be added or taken away. A figure keeps one kind of quantity.`
  : `A ${a} ${op} a ${b} has no kind here.`

/** Two doubles are the same size when they differ by less than a part in a thousand million: tenths are not held exactly. */
const near = (x: number, y: number): boolean => Math.abs(x - y) <= 1e-9 * Math.max(1, Math.abs(x), Math.abs(y))

function compare(op: '==' | '!=' | '<' | '<=' | '>' | '>=', a: Value, b: Value): Result {
  if (typeof a.value !== typeof b.value || !comparable(a.kind, b.kind)) return no(`A ${a.kind} and a ${b.kind} cannot be compared.`)
  if (typeof a.value !== 'number' || typeof b.value !== 'number') {
    return op === '==' ? truth(a.value === b.value) : op === '!=' ? truth(a.value !== b.value) : no('Only numbers are larger or smaller.')
  }
  const same = near(a.value, b.value)
  switch (op) {
    case '==': return truth(same)
    case '!=': return truth(!same)
    case '<': return truth(!same && a.value < b.value)
    case '<=': return truth(same || a.value < b.value)
    case '>': return truth(!same && a.value > b.value)
    case '>=': return truth(same || a.value > b.value)
  }
}

/** Text stands for a choice or a metal. */
export function comparable(a: Kind, b: Kind): boolean {
  const words = (kind: Kind) => kind === 'choice' || kind === 'metal'
  return a === b || (plain(a) && plain(b)) || (words(a) && words(b))
}

function called(node: Extract<Node, { k: 'call' }>, scope: Scope): Result {
  const entry = FUNCTION_TABLE[node.f]
  if (!entry) return no(`${node.f} is not there yet.`)
  const args: Value[] = []
  for (const arg of node.args) {
    const value = evaluate(arg, scope)
    if (!value.ok) return value
    args.push(value.value)
  }
  const kind = kindOfCall(entry.signature, args.map(arg => arg.kind))
  if (!kind.ok) return no(`${node.f}: ${kind.says}`)
  const value = entry.work(args)
  return value === null ? no(`${node.f} has no value for this.`) : number(kind.kind, value)
}

/** The kind a call gives, or what is wrong with its arguments. */
export function kindOfCall(signature: Signature, args: readonly Kind[]): { ok: true, kind: NumberKind } | { ok: false, says: string } {
  if ('root' in signature) {
    const [kind] = args
    if (args.length !== 1 || !kind) return no('it takes one value.')
    return plain(kind) ? { ok: true, kind: 'number' } : kind === 'area' ? { ok: true, kind: 'length' } : no('it takes a number or an area.')
  }
  if ('same' in signature) {
    const [first] = args
    if (!first || !isNumberKind(first) || args.length < signature.least || args.length > signature.most) return no(`it takes ${signature.least === signature.most ? signature.least : `${signature.least} to ${signature.most}`} values.`)
    if (args.every(kind => kind === first)) return { ok: true, kind: first }
    return args.every(plain) ? { ok: true, kind: 'number' } : no('all values must be of one kind.')
  }
  if (args.length !== signature.takes.length) return no(`it takes ${signature.takes.length} values.`)
  const wrong = signature.takes.findIndex((takes, i) => !fits(args[i] ?? 'choice', takes))
  if (wrong >= 0) return no(`value ${wrong + 1} must be a ${signature.takes[wrong]}.`)
  return isNumberKind(signature.gives) ? { ok: true, kind: signature.gives } : no('it gives no number.')
}

const fits = (kind: Kind, takes: Kind): boolean => kind === takes || (takes === 'number' && kind === 'count') || (takes === 'metal' && kind === 'choice')

/** Is this condition met? What has no value is not met. */
export function isTrue(node: Node, scope: Scope): boolean {
  const result = evaluate(node, scope)
  return result.ok && result.value.value === true
}

/** A whole number of times, at least 0; what has no value is 0. */
export function countOf(node: Node, scope: Scope): number {
  const result = evaluate(node, scope)
  return result.ok && typeof result.value.value === 'number' ? Math.max(0, Math.round(result.value.value)) : 0
}

/** The kind a size has once told; wire and cord are ways to ask for a length. */
export const KIND_OF_UNIT: Record<SizeUnit, Kind> = {
  mm: 'length', wire: 'length', cord: 'length', count: 'count', number: 'number', g: 'mass', deg: 'angle', metal: 'metal', choice: 'choice', yes_no: 'yes_no',
}

/** Sizes as told, as names for expressions. */
export function sizesScope(lesson: Pick<Lesson, 'sizes'>, sizes: Readonly<Record<string, SizeValue>>): Scope {
  const scope: Scope = {}
  for (const { name, unit } of lesson.sizes) {
    const value = sizes[name]
    if (value !== undefined) scope[name] = { kind: KIND_OF_UNIT[unit], value } as Value
  }
  return scope
}

export interface WorkedOut { figures: Record<string, Value>, without: Record<string, string> }

/** All figures in their order, from sizes in base units. What has no value is told in `without`, by name, with the reason. */
export function workOut(lesson: Pick<Lesson, 'sizes' | 'figures'>, sizes: Readonly<Record<string, SizeValue>>, facts: Scope = {}): WorkedOut {
  const scope = { ...facts, ...sizesScope(lesson, sizes) }
  const out: WorkedOut = { figures: {}, without: {} }
  for (const { name, node, kind } of lesson.figures) {
    const result = evaluate(node, scope)
    if (!result.ok) { out.without[name] = result.says; continue }
    const value = kind === 'count' && result.value.kind === 'number' ? { kind, value: result.value.value } as Value : result.value
    out.figures[name] = value
    scope[name] = value
  }
  return out
}
