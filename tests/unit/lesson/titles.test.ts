import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { SLUG } from '#shared/schemas/lessons'
import { freeSlug, titleOf } from '#shared/lesson/titles'

describe('addresses of lessons', () => {
  it('are made of the title', () => {
    expect(freeSlug('Wrapped-loop link', [])).toBe('wrapped-loop-link')
    expect(freeSlug('  Émaillé, à la main! ', [])).toBe('emaille-a-la-main')
  })

  it('are free, and never one of the pages’ own', () => {
    expect(freeSlug('Jump rings', ['jump-rings', 'jump-rings-2'])).toBe('jump-rings-3')
    expect(freeSlug('New', [])).toBe('new-2')
  })

  it('are slugs for every title, however many are taken', () => {
    fc.assert(fc.property(fc.string(), fc.integer({ min: 0, max: 20 }), (title, taken) => {
      const made = new Set<string>()
      for (let n = 0; n <= taken; n++) made.add(freeSlug(title, made))
      expect(made.size).toBe(taken + 1)
      for (const slug of made) expect(slug.length <= 40 && SLUG.test(slug)).toBe(true)
    }))
  })
})

describe('the title a text gives itself', () => {
  it.each([
    ['---\ntitle: Ear wire # a pair\ncraft: wire', 'Ear wire'],
    ['---\r\ntitle: "Say \\"ring\\": a test"\r\n', 'Say "ring": a test'],
    ['---\ntitle: \'It\'\'s a ring\'\n', 'It\'s a ring'],
    ['---\ntitle:\ncraft: wire', null],
    ['no head at all', null],
  ])('%j', (source, title) => {
    expect(titleOf(source)).toBe(title)
  })
})
