/** Densities and masses against published values and an independent table of the elements. */
import elements from 'node-periodic-table/elements.json'
import { describe, expect, it } from 'vitest'
import { METALS, metalNamed, wireMass } from '#shared/trade/metal'
import { awgToMm } from '#shared/trade/wire'

describe('Densities', () => {
  // node-periodic-table, an independent compilation (g/cm3).
  it.each([['fine silver', 'Ag'], ['copper', 'Cu'], ['pure gold', 'Au'], ['platinum', 'Pt']])('of %s is that of the element %s', (name, symbol) => {
    const element = elements.find(one => one.symbol === symbol)
    expect(element).toBeDefined()
    expect(Math.abs((metalNamed(name)?.density ?? 0) - Number(element?.density))).toBeLessThanOrEqual(0.02)
  })

  it('of sterling silver is that of its mixture, 1/rho = sum(w/rho), and of an alloy datasheet: 10.36', () => {
    expect(metalNamed('sterling silver')?.density).toBeCloseTo(1 / (0.925 / 10.49 + 0.075 / 8.96), 2)
  })

  it('lie in their own range and say where they are from', () => {
    for (const { density, from, to, source } of METALS) {
      expect(density).toBeGreaterThanOrEqual(from)
      expect(density).toBeLessThanOrEqual(to)
      expect(source.length).toBeGreaterThan(5)
    }
  })
})

describe('Mass of round wire', () => {
  // Grams a metre computed from the ASTM B258 diameter and the published densities above.
  it.each([[16, 'fine silver', 13.728], [20, 'fine silver', 5.430], [20, 'sterling silver', 5.3625], [22, 'sterling silver', 3.373], [24, 'copper', 1.834], [20, 'brass', 4.415], [22, 'nickel silver', 2.842]])('a metre of %i AWG %s is %d g', (n, metal, grams) => {
    expect(Math.abs((wireMass(metal, awgToMm(n), 1000) ?? 0) - grams)).toBeLessThanOrEqual(1e-3)
  })

  it('has none for a metal that is not in the list', () => {
    expect(wireMass('unobtainium', 1, 1)).toBeNull()
  })
})
