/** Each figure is worked out at the usual sizes, the corners of the ranges and between: finite, not below nought, a count whole. */
import { workOut } from '../figures'
import type { Lesson, SizeValue } from '../schema'
import type { Rule } from './context'

const BETWEEN = 200
const MOST_CORNERS = 1024

/** Numbers from 0 to 1, always the same ones (mulberry32, public domain). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6D2B79F5) >>> 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}

type Told = Record<string, SizeValue>

/** The ends of each size: from and to, the first and last choice, yes and no. */
function ends(lesson: Lesson): Record<string, SizeValue[]> {
  return Object.fromEntries(lesson.sizes.map((size) => {
    if (size.unit === 'yes_no') return [size.name, [true, false]]
    if (typeof size.usual !== 'number') return [size.name, size.choices.length > 0 ? size.choices : [size.usual]]
    return [size.name, [size.from ?? size.usual, size.to ?? size.usual]]
  }))
}

export function* samplePoints(lesson: Lesson): Generator<Told> {
  const usual = Object.fromEntries(lesson.sizes.map(size => [size.name, size.usual]))
  yield usual
  const all = Object.entries(ends(lesson)).filter(([, values]) => values.length > 1 && values[0] !== values[values.length - 1])
  const draw = seeded(20260501)
  const pick = (values: SizeValue[], high: boolean): SizeValue => (high ? values[values.length - 1] : values[0]) ?? values[0] ?? 0
  const corners = all.length <= 10 ? 2 ** all.length : MOST_CORNERS
  for (let i = 0; i < corners; i++) yield { ...usual, ...Object.fromEntries(all.map(([name, values], bit) => [name, pick(values, all.length <= 10 ? (i >> bit & 1) === 1 : draw() < 0.5)])) }
  for (let i = 0; i < BETWEEN; i++) yield { ...usual, ...Object.fromEntries(lesson.sizes.map(size => [size.name, between(size, draw())])) }
}

function between(size: Lesson['sizes'][number], at: number): SizeValue {
  if (size.unit === 'yes_no') return at < 0.5
  if (typeof size.usual !== 'number') return size.choices[Math.floor(at * size.choices.length)] ?? size.usual
  const from = size.from ?? size.usual
  const value = from + at * ((size.to ?? size.usual) - from)
  if (size.unit === 'count') return Math.round(value)
  return size.step ? Math.min(size.to ?? value, Math.round(value / size.step) * size.step) : value
}

export const corners: Rule = ({ lesson, kinds, add }) => {
  const good = { ...lesson, figures: lesson.figures.filter(figure => kinds.get(figure.name)) }
  if (good.figures.length === 0) return
  const told = new Set<string>()
  for (const sizes of samplePoints(lesson)) {
    const worked = workOut(good, sizes, { goods: { kind: 'yes_no', value: false }, practice: { kind: 'yes_no', value: true }, left: { kind: 'yes_no', value: false } })
    for (const figure of good.figures) {
      if (told.has(figure.name)) continue
      const value = worked.figures[figure.name]
      const says = worked.without[figure.name] ?? faultOf(figure.name, value?.value, kinds.get(figure.name) === 'count')
      if (!says) continue
      told.add(figure.name)
      const at = lesson.sizes.map(size => `${size.name} ${String(sizes[size.name])}`).slice(0, 6).join(', ')
      if (!Object.keys(worked.without).some(name => name !== figure.name && told.has(name))) add('figure-fails', figure.range, `${figure.name}: ${says} It is so at ${at}.`)
    }
    if (told.size === good.figures.length) return
  }
}

function faultOf(name: string, value: unknown, whole: boolean): string | null {
  if (typeof value !== 'number') return null
  if (!Number.isFinite(value)) return 'this has no finite value.'
  if (value < 0) return `${name} comes out below nought.`
  return whole && !Number.isInteger(value) ? `${name} is a count and comes out broken.` : null
}
