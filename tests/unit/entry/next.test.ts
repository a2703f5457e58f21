import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { nextPath } from '~/utils/next'

describe('where to go after coming in', () => {
  it('is a path of this studio', () => {
    for (const path of ['/bench', '/lessons/jump-rings/write?at=3#step', '/record/01J', '/a%2f%2fb']) expect(nextPath(path)).toBe(path)
    expect(nextPath(['/looks', '/people'])).toBe('/looks')
  })

  it('is home for anything that could lead elsewhere, or round in a ring', () => {
    for (const path of [undefined, null, 7, '', 'bench', '//elsewhere.example', '/\\elsewhere.example', '\\\\elsewhere.example', 'https://elsewhere.example', 'javascript:alert(1)', '/\t/elsewhere.example', '/\n/elsewhere.example', '/a\\b', '/come-in', '/come-in?next=/bench', '/come-in/card']) {
      expect([path, nextPath(path)]).toEqual([path, '/'])
    }
  })

  it('never leaves the origin, whatever is told', () => {
    const hostile = fc.string({ unit: fc.constantFrom('/', '\\', '.', ':', '@', '\t', '\n', '?', '#', 'a', 'https:', '%2f', ' ', 'é') })
    fc.assert(fc.property(fc.oneof(hostile, fc.string()).map(text => `/${text}`), (path) => {
      expect(new URL(nextPath(path), 'https://studio.example').origin).toBe('https://studio.example')
    }), { numRuns: 3000 })
  })
})
