import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { drawCoil, type Drawn, drawLoop, drawStrip, type Shape } from '../../../shared/trade/drawing'

const dimensions = (drawn: Drawn | null) => (drawn?.shapes ?? []).flatMap(shape => shape.t === 'dimension' ? [shape] : [])
const of = <T extends Shape['t']>(drawn: Drawn | null, t: T) => (drawn?.shapes ?? []).filter((shape): shape is Extract<Shape, { t: T }> => shape.t === t)
const span = (one: { from: [number, number], to: [number, number] }) => Math.hypot(one.to[0] - one.from[0], one.to[1] - one.from[1])
const allFinite = (drawn: Drawn | null) => JSON.stringify(drawn?.shapes ?? null).match(/null|NaN|Infinity/) === null

describe('a strip', () => {
  const strip = drawStrip({ length: 100, marks: [75, 25] }, { length: '100 mm', marks: ['75', '25'] })
  it('draws each mark from the same end, in proportion', () => {
    const [whole, first, second] = dimensions(strip)
    expect(whole && span(whole)).toBeCloseTo(560)
    expect(first && [first.says, span(first)]).toEqual(['25', expect.closeTo(140)])
    expect(second && [second.says, span(second)]).toEqual(['75', expect.closeTo(420)])
  })
  it('gives each mark a row of its own, so that no figure lies on another', () => {
    const rows = dimensions(strip).map(one => one.at[1])
    expect(new Set(rows).size).toBe(rows.length)
  })
  it('puts no figure across the tick of a mark close by', () => {
    const close = drawStrip({ length: 230, marks: [108, 115, 122] }, { length: '230 mm', marks: ['108 mm', '115 mm', '122 mm'] })
    const [, ...marks] = dimensions(close)
    const ends = marks.map(mark => mark.to[0])
    for (const [i, mark] of marks.entries()) {
      if (mark.anchor === 'start') expect(ends.slice(i + 1).every(end => end > mark.at[0] + 110)).toBe(true)
      else expect(mark.at[0]).toBeLessThan(mark.to[0])
    }
    expect(marks.map(mark => mark.anchor)).toEqual(['end', 'end', 'start'])
  })
  it('is not drawn with a mark off the wire, or no length', () => {
    expect(drawStrip({ length: 100, marks: [101] }, { length: '', marks: [] })).toBeNull()
    expect(drawStrip({ length: 0, marks: [] }, { length: '', marks: [] })).toBeNull()
    expect(drawStrip({ length: Number.NaN, marks: [] }, { length: '', marks: [] })).toBeNull()
  })
})

describe('a loop', () => {
  const says = { inside: '3 mm', neck: 'neck 2.1', jaw: 'jaw', bead: 'bead' }
  const figures = { inside: 3, wire: 0.7, neck: 2.1, bead: 8 }
  it('draws inside, wire, neck and bead at one scale', () => {
    const drawn = drawLoop(figures, says)
    const scale = (of(drawn, 'line')[0]?.width ?? 0) / 0.7
    const [inside, neck] = dimensions(drawn)
    const [bead, jaw] = of(drawn, 'circle')
    expect(inside && span(inside)).toBeCloseTo(3 * scale)
    expect(neck && span(neck)).toBeCloseTo(2.1 * scale)
    expect(bead?.r).toBeCloseTo(4 * scale)
    expect(jaw?.r).toBeCloseTo(1.5 * scale)
  })
  it('lays the inside of the wire on the jaw', () => {
    const drawn = drawLoop(figures, says)
    const jaw = of(drawn, 'circle')[1]
    const wire = of(drawn, 'line')[0]
    const round = Number(/A ([\d.]+)/.exec(wire?.d ?? '')?.[1])
    expect(round - (wire?.width ?? 0) / 2).toBeCloseTo(jaw?.r ?? 0, 1)
  })
  it('turns the shapes over for the left hand and lets the figures stand', () => {
    const right = drawLoop(figures, says)
    const left = drawLoop(figures, says, true)
    const over = (d: string | undefined) => (d ?? '').split(' ')
    const xOf = (drawn: Drawn | null) => Number(over(of(drawn, 'line')[0]?.d)[1])
    expect(xOf(right) + xOf(left)).toBeCloseTo(640)
    expect(dimensions(left).map(one => one.says)).toEqual(dimensions(right).map(one => one.says))
    expect(dimensions(left)[1]?.from[0]).toBeLessThan(xOf(left))
    expect(dimensions(right)[1]?.from[0]).toBeGreaterThan(xOf(right))
  })
  it('stays on its sheet at any sizes', () => {
    const mm = (min: number, max: number) => fc.double({ min, max, noNaN: true })
    fc.assert(fc.property(mm(0.5, 60), mm(0.1, 6), mm(0, 40), mm(1, 60), (inside, wire, neck, bead) => {
      const drawn = drawLoop({ inside, wire, neck, bead }, says)
      expect(allFinite(drawn)).toBe(true)
      for (const one of dimensions(drawn)) for (const [x, y] of [one.from, one.to, one.at]) {
        expect(x).toBeGreaterThanOrEqual(0)
        expect(x).toBeLessThanOrEqual(640)
        expect(y).toBeGreaterThanOrEqual(0)
        expect(y).toBeLessThanOrEqual(440)
      }
    }))
  })
})

describe('a coil', () => {
  it('draws the turns, each touching the last, and a half turn to one side only', () => {
    const drawn = drawCoil({ turns: 2.5, core: 0.7, wire: 0.7 }, { turns: '2½ turns', core: 'neck', length: '1.8 mm' })
    const wires = of(drawn, 'line').filter(line => line.role === 'wire')
    expect(wires).toHaveLength(3)
    expect(wires[2]?.d.endsWith(' 180')).toBe(true)
    const [across] = dimensions(drawn)
    expect(across && span(across)).toBeCloseTo((wires[0]?.width ?? 0) / 0.94 * 3)
  })
  it('is not drawn without turns, core or wire', () => {
    for (const figures of [{ turns: 0, core: 1, wire: 1 }, { turns: 2, core: -1, wire: 1 }, { turns: 2, core: 1, wire: Infinity }]) {
      expect(drawCoil(figures, { turns: '', core: '', length: '' })).toBeNull()
    }
  })
})
