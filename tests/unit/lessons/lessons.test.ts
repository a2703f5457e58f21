import { execFileSync } from 'node:child_process'
import { readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { decimal, type PieceStarted } from '../../../shared/bench/events'
import { plan } from '../../../shared/bench/machine'
import { textOf } from '../../../shared/bench/scope'
import { compile } from '../../../shared/lesson/compile'
import { workOut } from '../../../shared/lesson/figures'

const FOLDER = new URL('../../../content-src/lessons/', import.meta.url)
const slugs = readdirSync(FOLDER)
const read = (slug: string) => compile(readFileSync(new URL(`${slug}/lesson.md`, FOLDER), 'utf8'), { pictures: new Set(readdirSync(new URL(`${slug}/`, FOLDER))), lessons: new Set(slugs) })

describe.each(slugs)('%s', (slug) => {
  const { lesson, findings } = read(slug)

  it('has nothing wrong and needs no advice but pictures for what the hand feels', () => {
    expect(findings.filter(finding => finding.severity === 'error')).toEqual([])
    expect(findings.filter(finding => finding.code !== 'no-picture-no-measure').map(finding => `${finding.line} ${finding.message}`)).toEqual([])
  })

  it('makes a plan at its usual sizes, for a beginner and for who holds 4', () => {
    const sizes = Object.fromEntries(lesson.sizes.map(size => [size.name, size.usual]))
    const told = Object.fromEntries(Object.entries(sizes).map(([name, value]) => [name, { value: typeof value === 'number' ? decimal(value) : typeof value === 'boolean' ? (value ? 'yes' : 'no') : value, typed: '' }]))
    const figures = Object.fromEntries(Object.entries(workOut(lesson, sizes).figures).map(([name, value]) => [name, textOf(value)]))
    const start = (level: number): PieceStarted => ({ lesson: '', revision: '', compiled: '', engine: 1, sizes: told, figures, plan: '', material: '', practice: true, goods: null, left: false, level, once: { passed: [], samples: {} } })
    for (const level of [0, 4]) {
      const planned = plan(lesson, start(level))
      expect(planned.ok && planned.turns.length).toBeGreaterThan(5)
    }
  })

  it('has a hold, an essential line, a fault with its cure, and a closing list', () => {
    const steps = lesson.parts.flatMap(part => part.steps)
    expect(steps.some(step => step.holds.length > 0)).toBe(true)
    expect(lesson.criteria.some(criterion => criterion.essential)).toBe(true)
    expect([...lesson.faults, ...steps.flatMap(step => step.faults)].length).toBeGreaterThan(1)
    expect(lesson.closing.length).toBeGreaterThan(2)
  })
})

it('their pictures are as the script draws them', () => {
  expect(() => execFileSync(process.execPath, [fileURLToPath(new URL('../../../scripts/draw/draw.mjs', import.meta.url)), '--check'])).not.toThrow()
})
