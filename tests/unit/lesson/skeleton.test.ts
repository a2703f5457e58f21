import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compile, errorsOf } from '#shared/lesson/compile'
import { CRAFTS } from '#shared/lesson/schema'
import { skeletonOf } from '#shared/lesson/skeleton'

describe('the text a new lesson begins with', () => {
  it.each(CRAFTS)('of %s lacks only what must be written, so it cannot be put into use as it stands', (craft) => {
    const compiled = compile(skeletonOf('Jump rings', craft))
    expect(compiled.lesson).toMatchObject({ title: 'Jump rings', craft })
    expect(errorsOf(compiled).map(finding => finding.code)).toEqual(['fault-incomplete'])
  })

  it('is fit for use once its fault is told', () => {
    const source = skeletonOf('Jump rings', 'wire').replace('because:', 'because: it was cut by eye').replace('do:', 'do: Cut again from the stop.')
    expect(errorsOf(compile(source))).toEqual([])
  })

  it('keeps every title a person can give', () => {
    const title = fc.string({ minLength: 1, maxLength: 60, unit: fc.constantFrom('a', 'Z', ' ', '"', '\'', ':', '#', '{', '}', ',', '-', '\\', '&', '*', '!', '0', '%', '@', '`', 'é', '½') }).map(text => text.trim()).filter(text => text.length > 1)
    fc.assert(fc.property(title, (given) => {
      expect(compile(skeletonOf(given, 'wire')).lesson.title).toBe(given)
    }))
  })
})
