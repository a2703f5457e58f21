import { describe, expect, it } from 'vitest'
import { GROUND_TOKENS, SAFETY_COLOURS } from '../../../shared/look'

// WCAG 2.2, relative luminance and contrast ratio (definitions of "relative luminance" and "contrast ratio").
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map(at => Number.parseInt(hex.slice(at, at + 2), 16) / 255).map(c => c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4)
  return 0.2126 * r + 0.7152 * g + 0.0722 * b
}
function contrast(a: string, b: string): number {
  const [light = 0, dark = 0] = [luminance(a), luminance(b)].sort((x, y) => y - x)
  return (light + 0.05) / (dark + 0.05)
}

it('the formula gives the ratios WCAG names: 21 for black on white, 1 for a colour on itself', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5)
  expect(contrast('#767676', '#ffffff')).toBeGreaterThan(4.5)
  expect(contrast('#777777', '#ffffff')).toBeLessThan(4.5)
})

describe.each(Object.entries(GROUND_TOKENS))('on %s', (_, tokens) => {
  it.each(['paper', 'sheet'] as const)('text at the bench has at least 7:1 on %s', (ground) => {
    for (const name of ['ink', 'graphite', 'brass', 'patina', 'garnet'] as const) expect(contrast(tokens[name], tokens[ground]), name).toBeGreaterThanOrEqual(7)
  })
  it.each(['paper', 'sheet'] as const)('marks and edges of controls have at least 3:1 on %s', (ground) => {
    for (const name of ['bare', 'brass', 'patina', 'garnet', 'steel', 'ink'] as const) expect(contrast(tokens[name], tokens[ground]), name).toBeGreaterThanOrEqual(3)
  })
  it('the chosen thing is read in paper on ink', () => {
    expect(contrast(tokens.paper, tokens.ink)).toBeGreaterThanOrEqual(7)
    expect(contrast(tokens.sheet, tokens.patina)).toBeGreaterThanOrEqual(4.5)
  })
})

it('safety words are read on their colours', () => {
  for (const [word, [ground, text]] of Object.entries(SAFETY_COLOURS)) expect(contrast(ground, text), word).toBeGreaterThanOrEqual(4.5)
})
