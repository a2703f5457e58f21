/** Sizes as they are told before a piece begins: read, stepped, checked against what the lesson covers, and set down. */
import { workOut, type WorkedOut } from '../lesson/figures'
import { FIGURE_ENGINE, type Lesson, type Size, type SizeUnit, type SizeValue } from '../lesson/schema'
import { type LengthUnits, shownLength, shownValue } from '../lesson/shown'
import { METAL_NAMES } from '../lesson/functions'
import { readTyped } from '../trade/units'
import { decimal, type PieceStarted, type Told } from './events'
import { plan, planSha, type Turn } from './plan'
import { covered, faultOfSize, KIND_OF_UNIT, textOf, valueOf } from './scope'

export type ToldSizes = PieceStarted['sizes']
export type TypedSize = { ok: true, told: Told } | { ok: false, says: string }

const WORDS: readonly SizeUnit[] = ['choice', 'metal', 'yes_no']
export const isWords = (size: Size): boolean => WORDS.includes(size.unit)
const lengthLike = (size: Size): boolean => KIND_OF_UNIT[size.unit] === 'length'

/** What a size that is told in words may be. */
export function choicesOf(size: Size): readonly string[] {
  if (size.unit === 'yes_no') return ['yes', 'no']
  return size.choices.length > 0 ? size.choices : size.unit === 'metal' ? METAL_NAMES : []
}

/** How much – and + change a size: what the lesson says, else by what it is. In mm, g, degrees or as it is. */
export function stepOfSize(size: Size, units: LengthUnits): number {
  if (size.step !== null && size.step > 0) return size.step
  if (units === 'in' && lengthLike(size)) return 25.4 / 64
  return { mm: 0.5, wire: 0.05, cord: 0.05, count: 1, number: 0.5, g: 0.1, deg: 5, choice: 1, metal: 1, yes_no: 1 }[size.unit]
}

/** A value of a size as it is told. */
export function toldOf(size: Size, value: SizeValue, units: LengthUnits = 'mm'): Told {
  const text = typeof value === 'number' ? decimal(value) : typeof value === 'boolean' ? (value ? 'yes' : 'no') : value
  const read = valueOf(text, KIND_OF_UNIT[size.unit])
  return { value: text, typed: read ? shownValue(read, units).slice(0, 40) : text.slice(0, 40) }
}

export const usualSizes = (lesson: Pick<Lesson, 'sizes'>, units: LengthUnits = 'mm'): ToldSizes =>
  Object.fromEntries(lesson.sizes.map(size => [size.name, toldOf(size, size.usual, units)]))

/** Sizes told last time, where this revision still asks for them and they can still be read; else the usual. */
export function sizesAgain(lesson: Pick<Lesson, 'sizes'>, last: ToldSizes | null, units: LengthUnits = 'mm'): ToldSizes {
  return Object.fromEntries(lesson.sizes.map((size) => {
    const before = last?.[size.name]
    return [size.name, before && faultOfSize(size, before) === null ? before : toldOf(size, size.usual, units)]
  }))
}

/** – or +: to the next step (never below nought), or the next of its words, round and round. */
export function stepSize(size: Size, told: Told, way: 1 | -1, units: LengthUnits = 'mm'): Told {
  const words = choicesOf(size)
  if (isWords(size)) {
    const at = words.indexOf(told.value)
    const next = words[(at + way + words.length) % words.length]
    return next === undefined ? told : { value: next, typed: next.slice(0, 40) }
  }
  const step = stepOfSize(size, units)
  const now = Number(told.value)
  const next = Math.max(0, way === 1 ? Math.floor(now / step + 1e-6) * step + step : Math.ceil(now / step - 1e-6) * step - step)
  return toldOf(size, Number(next.toFixed(9)), units)
}

/** What was typed for a size. A length without a unit is in the person's own. */
export function typeSize(size: Size, text: string, units: LengthUnits = 'mm'): TypedSize {
  if (isWords(size)) {
    const word = choicesOf(size).find(choice => choice.toLowerCase() === text.trim().toLowerCase())
    return word === undefined ? { ok: false, says: `${size.ask}: choose one of ${choicesOf(size).join(', ')}.` } : { ok: true, told: { value: word, typed: word.slice(0, 40) } }
  }
  if (size.unit === 'choice' || size.unit === 'metal' || size.unit === 'yes_no') return { ok: false, says: size.ask }
  const own = units === 'in' && lengthLike(size) && /^[\d\s./,½¼¾]+$/.test(text) ? `${text} in` : text
  const read = readTyped(own, size.unit)
  if (!read.ok) return read
  const told = { value: decimal(read.value), typed: text.trim().slice(0, 40) }
  const fault = faultOfSize(size, told)
  return fault === null ? { ok: true, told } : { ok: false, says: fault }
}

/** The sentence for a size outside what the lesson covers, or null. */
export function outsideSays(size: Size, told: Told, units: LengthUnits = 'mm'): string | null {
  if (covered(size, told)) return null
  const show = (value: number) => lengthLike(size) ? shownLength(value, units) : decimal(value)
  const range = size.from !== null && size.to !== null ? `${show(size.from)} to ${show(size.to)}` : size.from !== null ? `${show(size.from)} or more` : `${show(size.to ?? 0)} or less`
  return `Outside what this lesson covers (${range}). You can go on for practice; it will not count.`
}

/** Sizes as the evaluator takes them; one that cannot be read is left out. */
function valuesOf(lesson: Pick<Lesson, 'sizes'>, sizes: ToldSizes): Record<string, SizeValue> {
  return Object.fromEntries(lesson.sizes.flatMap((size) => {
    const value = valueOf(sizes[size.name]?.value ?? '', KIND_OF_UNIT[size.unit])
    return value ? [[size.name, value.value]] : []
  }))
}

export const worked = (lesson: Pick<Lesson, 'sizes' | 'figures'>, sizes: ToldSizes): WorkedOut => workOut(lesson, valuesOf(lesson, sizes))

export interface BeginWith {
  lesson: Lesson
  ids: { lesson: string, revision: string, compiled: string }
  sizes: ToldSizes
  practice: boolean
  left: boolean
  level: number
  once: PieceStarted['once']
}
export type Begun = { ok: true, start: PieceStarted, turns: Turn[] } | { ok: false, says: string }

/** The body of `piece.started`, or why this piece cannot begin. */
export function beginWith({ lesson, ids, sizes, practice, left, level, once }: BeginWith): Begun {
  for (const size of lesson.sizes) {
    const fault = faultOfSize(size, sizes[size.name])
    if (fault) return { ok: false, says: fault }
  }
  const { figures, without } = worked(lesson, sizes)
  const missing = lesson.figures.find(figure => !figures[figure.name])
  if (missing) return { ok: false, says: `With these sizes “${missing.name}” has no value. ${without[missing.name] ?? ''} Change the sizes.`.replace('  ', ' ') }
  const isOutside = lesson.sizes.some(size => !covered(size, sizes[size.name] ?? { value: '', typed: '' }))
  const metal = lesson.sizes.find(size => size.unit === 'metal')
  const start: PieceStarted = {
    ...ids, engine: FIGURE_ENGINE, sizes: Object.fromEntries(lesson.sizes.map(size => [size.name, sizes[size.name] ?? toldOf(size, size.usual)])),
    figures: Object.fromEntries(Object.entries(figures).map(([name, value]) => [name, textOf(value)])), plan: '0'.repeat(64),
    material: (metal ? sizes[metal.name]?.value ?? '' : '').slice(0, 60), practice: practice || isOutside, goods: null, left, level, once,
  }
  const planned = plan(lesson, start)
  return planned.ok ? { ok: true, start: { ...start, plan: planSha(planned.turns) }, turns: planned.turns } : planned
}
