import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { compile } from '#shared/lesson/compile'
import { wireMarks } from '~/utils/author/marks'
import { placeName, stepAt, stepPlaces } from '~/utils/author/places'

const source = readFileSync(new URL('../../fixtures/lessons/wrapped-loop-link.md', import.meta.url), 'utf8')
const { lesson } = compile(source)
const at = (text: string) => source.indexOf(text)

describe('where in a lesson a place of its text is', () => {
  it('is the step it stands in, from its heading to the next', () => {
    expect(stepAt(lesson, at('## Mark the bend'))?.step.key).toBe('mark')
    expect(stepAt(lesson, at('Grip the wire behind the mark'))?.step.key).toBe('bend')
    expect(stepAt(lesson, source.length)?.no).toBe(stepPlaces(lesson).length)
  })

  it('is no step in the head, in the opening, or between a part’s heading and its first step', () => {
    for (const text of ['title: ', 'A bead on a wire with a closed loop', 'key: first-end\n']) expect(stepAt(lesson, at(text))).toBeNull()
  })

  it('is named as an author would name it', () => {
    expect(placeName(source, lesson, at('wire_told:'))).toBe('Readings')
    expect(placeName(source, lesson, at('neck: (turns'))).toBe('Figures')
    expect(placeName(source, lesson, 0)).toBe('Head')
    expect(placeName(source, lesson, at('A bead on a wire with'))).toBe('Opening')
    expect(placeName(source, lesson, at('## Mark the bend') + 4)).toBe('Step 8')
    expect(placeName('half', null, 2)).toBe('Opening')
  })

  it('is marked on the wire: each step once at its heading, each hold after it at its own line', () => {
    const marks = wireMarks(lesson)
    expect(marks.filter(mark => mark.kind === 'step').map(mark => mark.no)).toEqual(stepPlaces(lesson).map(place => place.no))
    expect(marks.filter(mark => mark.kind === 'hold')).toHaveLength(stepPlaces(lesson).flatMap(({ step }) => step.holds).length)
    const lines = source.split('\n')
    for (const mark of marks) expect(lines[mark.line - 1]).toMatch(mark.kind === 'step' ? /^## / : /^HOLD /)
  })
})
