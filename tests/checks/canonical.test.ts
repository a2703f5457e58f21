import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonical, sha256, shaOf } from '../../shared/lesson/canonical'

describe('canonical JSON', () => {
  // RFC 8785, section 3.2.2 and 3.2.3, the sample and its canonical form (retyped from memory).
  it('gives the canonical form of the sample in RFC 8785', () => {
    const sample = JSON.parse('{"numbers":[333333333.33333329,1E30,4.50,2e-3,0.000000000000000000000000001],"string":"\\u20ac$\\u000F\\u000aA\'\\u0042\\u0022\\u005c\\\\\\"\\/","literals":[null,true,false]}')
    expect(canonical(sample)).toBe('{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}')
  })

  // RFC 8785, section 3.2.3: members are sorted by UTF-16 code units (retyped from memory).
  it('sorts members by UTF-16 code units', () => {
    const keys = ['\u20ac', '\r', '\ufb33', '1', '\ud83d\ude00', '\u0080', '\u00f6']
    const sorted = ['\r', '1', '\u0080', '\u00f6', '\u20ac', '\ud83d\ude00', '\ufb33']
    expect(Object.keys(JSON.parse(canonical(Object.fromEntries(keys.map(key => [`k${key}`, 1])))))).toEqual(sorted.map(key => `k${key}`))
  })

  it('says the same for the same value however its members were ordered', () => {
    fc.assert(fc.property(fc.jsonValue(), (value) => {
      const again = JSON.parse(JSON.stringify(value), (_, inner) => inner && typeof inner === 'object' && !Array.isArray(inner) ? Object.fromEntries(Object.entries(inner).reverse()) : inner)
      expect(shaOf(again)).toBe(shaOf(JSON.parse(JSON.stringify(value))))
    }))
  })

  it('refuses what JSON cannot say', () => {
    expect(() => canonical(undefined)).toThrow()
    expect(() => canonical({ a: Number.NaN })).toThrow()
  })
})

describe('SHA-256', () => {
  // FIPS 180-4, the example messages published with it (retyped from memory).
  it('gives the digests of the FIPS 180-4 examples', () => {
    expect(sha256('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad')
    expect(sha256('')).toBe('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855')
  })

  it('agrees with the platform’s own for any text', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme' }), (text) => {
      expect(sha256(text)).toBe(createHash('sha256').update(text, 'utf8').digest('hex'))
    }))
  })
})
