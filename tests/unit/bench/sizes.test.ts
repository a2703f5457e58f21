import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { PieceStartedSchema } from '../../../shared/bench/events'
import { planSha } from '../../../shared/bench/machine'
import { beginWith, choicesOf, outsideSays, sizesAgain, stepSize, toldOf, typeSize, usualSizes } from '../../../shared/bench/sizes'
import { compile } from '../../../shared/lesson/compile'
import type { Size } from '../../../shared/lesson/schema'
import { drawn } from '../../../shared/lesson/drawn'
import { scopeOf } from '../../../shared/bench/scope'
import { id } from './bench-lesson'

const { lesson } = compile(readFileSync(new URL('../../fixtures/lessons/wrapped-loop-link.md', import.meta.url), 'utf8'))
const size = (name: string): Size => {
  const found = lesson.sizes.find(one => one.name === name)
  if (!found) throw new Error(name)
  return found
}
const ids = { lesson: id(), revision: id(), compiled: 'a'.repeat(64) }
const begin = (sizes = usualSizes(lesson)) => beginWith({ lesson, ids, sizes, practice: false, left: false, level: 0, once: { passed: [], samples: {} } })

describe('– and +', () => {
  it('step from step to step, and stop at nought', () => {
    expect(stepSize(size('bead'), toldOf(size('bead'), 8), 1)).toEqual({ value: '8.5', typed: '8.5 mm' })
    expect(stepSize(size('bead'), toldOf(size('bead'), 8.2), 1).value).toBe('8.5')
    expect(stepSize(size('bead'), toldOf(size('bead'), 8.2), -1).value).toBe('8')
    expect(stepSize(size('turns'), toldOf(size('turns'), 2.5), -1)).toEqual({ value: '2', typed: '2' })
    expect(stepSize(size('wire'), toldOf(size('wire'), 0.02), -1).value).toBe('0')
  })
  it('go round the words of a choice', () => {
    const metal = size('metal')
    const words = choicesOf(metal)
    expect(stepSize(metal, toldOf(metal, words.at(-1) ?? ''), 1).value).toBe(words[0])
    expect(stepSize(metal, toldOf(metal, words[0] ?? ''), -1).value).toBe(words.at(-1))
  })
  it('there and back again is where it began, at every step of the lesson', () => {
    fc.assert(fc.property(fc.constantFrom(...lesson.sizes), fc.integer({ min: 1, max: 30 }), (one, times) => {
      let told = toldOf(one, one.usual)
      for (let i = 0; i < times; i++) told = stepSize(one, told, 1)
      for (let i = 0; i < times; i++) told = stepSize(one, told, -1)
      expect(told.value).toBe(toldOf(one, one.usual).value)
    }))
  })
})

describe('what is typed', () => {
  it('is kept as typed, beside its value in mm', () => {
    expect(typeSize(size('bead'), ' 5/16 in ')).toEqual({ ok: true, told: { value: '7.9375', typed: '5/16 in' } })
    expect(typeSize(size('bead'), '5/16', 'in')).toEqual({ ok: true, told: { value: '7.9375', typed: '5/16' } })
    expect(typeSize(size('turns'), '2½')).toEqual({ ok: true, told: { value: '2.5', typed: '2½' } })
    expect(typeSize(size('wire'), '21 awg')).toMatchObject({ ok: true, told: { typed: '21 awg' } })
  })
  it('is asked back where it can be read two ways or not at all', () => {
    expect(typeSize(size('wire'), '20 gauge')).toEqual({ ok: false, says: '20 what? 20 awg, 20 swg or a size in mm.' })
    for (const text of ['', 'big', '-3', '8 kg', 'NaN', 'Infinity', '1e3']) expect(typeSize(size('bead'), text).ok).toBe(false)
    expect(typeSize(size('beads'), '2.5').ok).toBe(false)
    expect(typeSize(size('metal'), 'tin').ok).toBe(false)
  })
})

describe('outside what the lesson covers', () => {
  it('is said in the words of the lesson format', () => {
    expect(outsideSays(size('bead'), toldOf(size('bead'), 14))).toBe('Outside what this lesson covers (6 mm to 12 mm). You can go on for practice; it will not count.')
    expect(outsideSays(size('bead'), toldOf(size('bead'), 12))).toBeNull()
    expect(outsideSays(size('metal'), toldOf(size('metal'), 'copper'))).toBeNull()
  })
  it('makes the piece practice, whatever was said', () => {
    const begun = begin({ ...usualSizes(lesson), bead: toldOf(size('bead'), 14) })
    expect(begun.ok && begun.start.practice).toBe(true)
    const inside = begin()
    expect(inside.ok && inside.start.practice).toBe(false)
  })
})

describe('beginning', () => {
  it('freezes sizes, figures and steps in a body the server can read', () => {
    const begun = begin()
    if (!begun.ok) throw new Error(begun.says)
    expect(PieceStartedSchema.parse(begun.start)).toEqual(begun.start)
    expect(begun.start.plan).toBe(planSha(begun.turns))
    expect(Number(begun.start.figures.cut)).toBeCloseTo(101.69, 1) // practice-corrections 1.1 b: 101.7
    expect(begun.start.material).toBe('copper')
  })
  it('is refused with a sentence where a size cannot be read or a figure has no value', () => {
    expect(begin({ ...usualSizes(lesson), bead: { value: 'x', typed: 'x' } })).toMatchObject({ ok: false })
    const { bead: _, ...without } = usualSizes(lesson)
    expect(begin(without)).toMatchObject({ ok: false, says: 'Missing: Bead along the hole, measured.' })
  })
  it('tells last time’s sizes again as far as they can be read', () => {
    expect(sizesAgain(lesson, { bead: { value: '9', typed: '9' }, metal: { value: 'tin', typed: 'tin' } })).toMatchObject({ bead: { value: '9' }, metal: { value: 'copper' } })
  })
})

describe('a lesson’s drawings', () => {
  it('are drawn from the figures of the piece: strip, loop and coil', () => {
    const begun = begin()
    if (!begun.ok) throw new Error(begun.says)
    const scope = scopeOf(lesson, begun.start)
    const all = lesson.parts.flatMap(part => part.steps.flatMap(step => step.drawings))
    const kinds = all.map(drawing => [drawing.kind, drawn(drawing, scope, 'mm', false)?.shapes.flatMap(shape => shape.t === 'dimension' ? [shape.says] : [])])
    expect(kinds).toContainEqual(['strip', ['102 mm', '44.8 mm', '57 mm']])
    expect(kinds).toContainEqual(['loop', ['3 mm', 'neck 2.1 mm']])
    expect(kinds).toContainEqual(['coil', ['2½ turns', '1.75 mm']])
  })
})
