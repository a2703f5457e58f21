import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { againOf, bandOf, isInside, linesOf } from '#shared/judging/marks'
import { judged, lesson, mm, name, outOf, reading, start, state, taken } from './lesson'

const measure = (key: string, of: string, more = {}) => judged(key, { by: 'measure', reading: of, ...more })
const oneLine = (values: number[][], more: Parameters<typeof reading>[1] = {}, criterion = {}) => {
  const set = outOf(lesson({ readings: [reading('first', more)], criteria: [measure('loop', 'first', criterion)] }))
  const [line] = linesOf(set, state({ readings: values.map((of, i) => taken('first', of, { turn: `turns@1.${i + 1}` })) }))
  if (!line) throw new Error('No line.')
  return line
}

describe('the lines of a piece', () => {
  it('leave out those whose when is not true for its sizes', () => {
    const joined = judged('joined', { when: { k: 'cmp', op: '!=', a: name('joins'), b: { k: 'text', v: 'nothing' } } })
    const one = lesson({ criteria: [judged('plane'), joined] })
    expect(linesOf(outOf(one), state()).map(line => line.key)).toEqual(['plane'])
    const told = start({ sizes: { ...start().sizes, joins: { value: 'the link before', typed: '' } } })
    expect(linesOf(outOf(one, told), state({ start: told })).map(line => line.key)).toEqual(['plane', 'joined'])
  })
  it('come one look after another, in the order the lesson first names them', () => {
    const criteria = [judged('jaws', { how: 'Eye, nail' }), judged('bead', { how: '10x against the first photo' }), measure('loop', 'first'), judged('tail', { how: 'Finger all round, then stocking' }),
      judged('pull', { how: 'Luggage balance' }), judged('joined', { how: 'Count, compare the drawing' }), judged('safe', { live: true, how: 'Eye' })]
    expect(linesOf(outOf(lesson({ criteria })), state()).map(line => [line.band, line.key])).toEqual([['30 cm', 'jaws'], ['30 cm', 'joined'], ['loupe', 'bead'], ['measure', 'loop'],
      ['finger, stocking', 'tail'], ['move it', 'pull'], ['seen live', 'safe']])
  })
  it('look by eye where the lesson does not say how', () => {
    expect(bandOf(judged('plane'))).toBe('30 cm')
    expect(bandOf(judged('turns', { how: 'Loupe' }))).toBe('loupe')
  })
})

describe('a measured line', () => {
  it('is inside or outside by its tolerance at each level, and nobody says so', () => {
    const line = oneLine([[4.7]])
    expect(line.inside).toEqual([true, true, true, false, false, false])
    expect(line.limits[2]?.high).toBeCloseTo(4.7)
    expect(line.limits[3]?.high).toBeCloseTo(4.6)
    expect(oneLine([[4.6]]).inside[5]).toBe(true)
  })
  it('is nothing where nothing was measured', () => {
    expect(oneLine([])).toMatchObject({ value: null, takes: [], inside: [null, null, null, null, null, null] })
  })
  it('is as bad as its worst, in a set', () => {
    expect(oneLine([[4.4], [4.9], [4.3]])).toMatchObject({ value: 4.9, inside: [false, false, false, false, false, false] })
  })
  it('goes by the newest measure of a turn', () => {
    const set = outOf(lesson({ criteria: [measure('loop', 'first')] }))
    const [line] = linesOf(set, state({ readings: [taken('first', [5]), taken('first', [4.4])] }))
    expect(line).toMatchObject({ value: 4.4, inside: [true, true, true, true, true, true] })
  })
  it('is held to the sample where the lesson says so', () => {
    const readings = [reading('trial', { within: mm(1) }), reading('long', { is: null, sampleOf: 'trial', within: mm(0.2), atLevels: [] })]
    const set = outOf(lesson({ readings, criteria: [measure('length', 'long')] }))
    expect(linesOf(set, state({ readings: [taken('trial', [5]), taken('long', [5.1])] }))[0]?.inside[5]).toBe(true)
    expect(linesOf(set, state({ readings: [taken('trial', [4]), taken('long', [5.1])] }))[0]?.inside[5]).toBe(false)
  })
  it('is round by its widest less its narrowest', () => {
    const set = outOf(lesson({ readings: [reading('first', { times: 2 })], criteria: [judged('round', { by: 'spread', reading: 'first', within: mm(0.2), atLevels: [{ level: 2, within: mm(0.3) }] })] }))
    const line = linesOf(set, state({ readings: [taken('first', [4.3, 4.6])] }))[0]
    expect(line?.value).toBeCloseTo(0.3)
    expect(line?.inside).toEqual([true, true, true, false, false, false])
    expect(linesOf(set, state({ readings: [taken('first', [4.4])] }))[0]).toMatchObject({ value: null, inside: [false, false, false, false, false, false] })
  })
  it('is never inside at a level and outside at a lower one, when the tolerance is wider below', () => {
    fc.assert(fc.property(fc.array(fc.integer({ min: 300, max: 600 }), { minLength: 1, maxLength: 5 }), (values) => {
      const line = oneLine(values.map(value => [value / 100]))
      expect(line.inside.every((inside, level) => level === 0 || !inside || line.inside[level - 1])).toBe(true)
      expect(isInside(line, line.value ?? 0, 4)).toBe(line.inside[4])
    }))
  })
})

describe('the measure asked for again', () => {
  const lines = linesOf(outOf(lesson({ readings: [reading('first'), reading('second')], criteria: [measure('a', 'first'), measure('b', 'second'), judged('c')] })), state({ readings: [taken('first', [4.4]), taken('second', [4.4])] }))
  it('is one of the measured lines, drawn from the hash of the piece', () => {
    expect(againOf(lines, `00000000${'f'.repeat(56)}`)).toBe('a')
    expect(againOf(lines, `00000001${'f'.repeat(56)}`)).toBe('b')
    expect(againOf(lines.slice(2), '0'.repeat(64))).toBeNull()
  })
})
