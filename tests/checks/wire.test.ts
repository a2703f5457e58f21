/** Wire gauges, loops, coils and masses against published values; the source stands beside each. */
import { unit } from 'mathjs'
import Qty from 'js-quantities'
import { describe, expect, it } from 'vitest'
import { inInches, readTyped } from '#shared/trade/units'
import { awgToMm, mmToAwg, nearestGauges, swgToMm } from '#shared/trade/wire'
import { coil, ring } from '#shared/trade/wire-forms'

describe('American wire gauge', () => {
  it('has its two points of definition (ASTM B258: No. 0000 is 0.4600 in, No. 36 is 0.0050 in)', () => {
    expect(awgToMm(-3)).toBeCloseTo(11.684, 9)
    expect(awgToMm(36)).toBeCloseTo(0.127, 9)
  })

  // A published table of AWG sizes, inches to four places.
  it.each([[10, 0.1019], [12, 0.0808], [14, 0.0641], [16, 0.0508], [18, 0.0403], [20, 0.0320], [22, 0.0253], [24, 0.0201], [26, 0.0159], [28, 0.0126], [30, 0.0100], [34, 0.0063]])('No. %i is %d in', (n, inches) => {
    expect(Math.abs(awgToMm(n) / 25.4 - inches)).toBeLessThanOrEqual(0.00005)
  })

  it('is turned back by its inverse, and No. 20 is 0.8118 mm (ASTM B258 formula)', () => {
    expect(awgToMm(20)).toBeCloseTo(0.8118, 4)
    for (let n = -3; n <= 40; n++) expect(mmToAwg(awgToMm(n))).toBeCloseTo(n, 9)
  })
})

describe('British Standard Wire Gauge', () => {
  // Comparative wire-gauge table after BS 3737:1964, mm to three places; 28 and 30 from memory of that standard.
  it.each([[11, 2.946], [12, 2.642], [13, 2.337], [14, 2.032], [15, 1.829], [16, 1.626], [20, 0.914], [21, 0.813], [22, 0.711], [23, 0.610], [28, 0.376], [30, 0.315]])('No. %i is %d mm', (n, mm) => {
    expect(Math.abs((swgToMm(n) ?? 0) - mm)).toBeLessThanOrEqual(0.0005)
  })

  it('is thicker than American at the same number: 20 by 12.6 %, 18 by 19 % (the two tables above)', () => {
    expect((swgToMm(20) ?? 0) / awgToMm(20)).toBeCloseTo(1.126, 3)
    expect((swgToMm(18) ?? 0) / awgToMm(18)).toBeCloseTo(1.19, 2)
  })

  it('has no number outside its table and never grows with the number', () => {
    expect(swgToMm(9)).toBeNull()
    expect(swgToMm(20.5)).toBeNull()
    for (let n = 11; n <= 30; n++) expect(swgToMm(n) ?? 9).toBeLessThan(swgToMm(n - 1) ?? 0)
  })

  it('is named with how far it is off: 0.8118 mm is 20 AWG, and 21 SWG but for a thousandth', () => {
    const [awg, swg] = nearestGauges(0.8118)
    expect(awg).toMatchObject({ system: 'AWG', number: 20 })
    expect(swg).toMatchObject({ system: 'SWG', number: 21 })
    expect(swg?.off).toBeCloseTo(-0.001, 4)
  })
})

describe('Loops and coils', () => {
  // Mensuration, L = pi (D + d), neutral axis at the middle of the wire; values computed by hand from it.
  it.each([[5, 1, 18.8496], [4, 0.8118, 15.117], [3, 0.8, 11.938]])('a loop of %d inside in %d wire takes %d', (inside, wire, length) => {
    expect(Math.abs(ring(inside, wire) - length)).toBeLessThan(6e-4)
  })

  // Length of a helix of pitch d.
  it.each([[20, 3, 0.8, 239.2965], [3, 0.8, 0.8, 15.269], [10, 1.0237, 0.4049, 45.063]])('%d turns on %d in %d wire take %d', (turns, core, wire, length) => {
    expect(Math.abs(coil(turns, core, wire) - length)).toBeLessThan(1e-3)
  })

  it('agrees with the curve itself, walked in short straight pieces', () => {
    const [turns, core, wire, pieces] = [2.5, 0.7, 0.7, 40_000]
    const radius = (core + wire) / 2
    const at = (i: number) => { const angle = 2 * Math.PI * turns * i / pieces; return [radius * Math.cos(angle), radius * Math.sin(angle), wire * angle / (2 * Math.PI)] as const }
    let length = 0
    for (let i = 1; i <= pieces; i++) { const [a, b] = [at(i - 1), at(i)]; length += Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]) }
    expect(coil(turns, core, wire)).toBeCloseTo(length, 6)
  })
})

describe('Inches', () => {
  it.each(['1 in', '5/16 in', '1 1/2 in', '0.7 mm', '2.5 cm'])('%s is the same length to two other libraries', (text) => {
    const read = readTyped(text, 'mm')
    const [number = '', written = ''] = text.split(/ (?=[a-z]+$)/)
    const plain = number.split(' ').reduce((sum, part) => { const [top, bottom = '1'] = part.split('/'); return sum + Number(top) / Number(bottom) }, 0)
    const value = read.ok ? read.value : Number.NaN
    expect(value).toBeCloseTo(unit(plain, written).toNumber('mm'), 6)
    expect(value).toBeCloseTo(Qty(plain, written).to('mm').scalar, 6)
  })

  it('parts a whole from its fraction by a space: 53/64 in is 21.03 mm and no 5 3/64 (1 in is 25.4 mm exactly)', () => {
    expect(readTyped('53/64 in', 'mm')).toEqual({ ok: true, value: 21.034375 })
    expect(readTyped('5 3/64 in', 'mm')).toEqual({ ok: true, value: 128.190625 })
    expect(readTyped('1.5 1/2 in', 'mm').ok).toBe(false)
  })

  it('are shown to the nearest 64th and read back within half of one', () => {
    for (let mm = 0.4; mm < 120; mm += 0.37) {
      const read = readTyped(inInches(mm), 'mm')
      expect(Math.abs((read.ok ? read.value : Number.NaN) - mm)).toBeLessThanOrEqual(25.4 / 128 + 1e-6)
    }
  })
})
