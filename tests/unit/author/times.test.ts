import { describe, expect, it } from 'vitest'
import { countWords, shortTime, workTime } from '~/utils/author/times'

describe('times and counts in words', () => {
  it('says minutes and hours as a bench says them', () => {
    expect([5, 60, 75, 90, 120, 240, 250].map(workTime)).toEqual(['5 min', '60 min', '75 min', '1½ h', '2 h', '4 h', '250 min'])
  })

  it('says small numbers in words', () => {
    expect([countWords(0, 'error', 'errors'), countWords(1, 'error', 'errors'), countWords(12, 'error', 'errors'), countWords(13, 'error', 'errors')]).toEqual(['no errors', 'one error', 'twelve errors', '13 errors'])
  })

  it('gives the clock today and the day with it before', () => {
    const now = new Date(2026, 2, 17, 12, 0)
    expect(shortTime(new Date(2026, 2, 17, 10, 41).toISOString(), now)).toBe('10:41')
    expect(shortTime(new Date(2026, 2, 16, 10, 41).toISOString(), now)).toBe('16 Mar 2026, 10:41')
  })
})
