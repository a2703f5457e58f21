import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { DecimalSchema } from '../../../shared/bench/events'
import { DIGITS, type KeypadKey, keypadKey, typedNumber, typeKey } from '../../../shared/bench/keypad'

const type = (keys: KeypadKey[], whole = false): string => keys.reduce((text, key) => typeKey(text, key, whole), '')

describe('the keypad', () => {
  it('types a measure', () => {
    expect(type(['4', 'point', '4'])).toBe('4.4')
    expect(typedNumber('4.4')).toBe('4.4')
  })
  it('puts a nought before a point and takes the last key back', () => {
    expect(type(['point', '7'])).toBe('0.7')
    expect(type(['1', '2', 'back', 'back', 'back'])).toBe('')
  })
  it('keeps to one point, and to none in a count', () => {
    expect(type(['4', 'point', 'point', '5'])).toBe('4.5')
    expect(type(['1', 'point', '1'], true)).toBe('11')
  })
  it('has no number while nothing stands there', () => {
    expect(typedNumber('')).toBeNull()
  })
  it('reads ends that say nothing', () => {
    expect(typedNumber('4.')).toBe('4')
    expect(typedNumber('4.50')).toBe('4.5')
    expect(typedNumber('100')).toBe('100')
    expect(typedNumber('0.0')).toBe('0')
  })
  it('knows the keys of a keyboard', () => {
    expect(keypadKey(',')).toBe('point')
    expect(keypadKey('7')).toBe('7')
    expect(keypadKey('Backspace')).toBe('back')
    expect(keypadKey('e')).toBeNull()
    expect(keypadKey('-')).toBeNull()
  })
  it('gives a decimal an event can carry, of the value typed, whatever is pressed', () => {
    const keys = fc.array(fc.constantFrom<KeypadKey>(...DIGITS, 'point', 'back'), { maxLength: 20 })
    fc.assert(fc.property(keys, fc.boolean(), (pressed, whole) => {
      const text = type(pressed, whole)
      const value = typedNumber(text)
      if (value === null) { expect(text).toBe(''); return }
      expect(DecimalSchema.safeParse(value).success).toBe(true)
      expect(Number(value)).toBe(Number(text))
      expect(Number(value)).toBeLessThan(10_000)
      if (whole) expect(Number.isInteger(Number(value))).toBe(true)
    }))
  })
})
