import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { dayIn } from '#shared/bench/day'
import { addDays, daysBetween } from '#shared/judging/days'
import { lapse } from '#shared/judging/lapse'
import { settingsAt, USUAL_SETTINGS } from '#shared/judging/settings'

const row = (levelSigned: number, aliveOn: string, keeps: number | null = 182) => ({ levelSigned, aliveOn, keeps })
const day = fc.date({ min: new Date('2000-01-01T00:00:00Z'), max: new Date('2099-12-31T00:00:00Z'), noInvalidDate: true }).map(at => at.toISOString().slice(0, 10))

describe('days', () => {
  it('are the days of the zone, not of the server', () => {
    const at = new Date('2026-03-01T23:30:00Z')
    expect(dayIn('Europe/London', at)).toBe('2026-03-01')
    expect(dayIn('Europe/Warsaw', at)).toBe('2026-03-02')
    expect(dayIn('America/Los_Angeles', at)).toBe('2026-03-01')
    expect(dayIn('Pacific/Kiritimati', at)).toBe('2026-03-02')
  })
  it('count over months, leap days and the days the clocks change', () => {
    expect(addDays('2024-02-28', 1)).toBe('2024-02-29')
    expect(addDays('2026-03-28', 2)).toBe('2026-03-30')
    expect(daysBetween('2026-10-24', '2026-10-26')).toBe(2)
    expect(() => addDays('soon', 1)).toThrow(RangeError)
  })
  it('add and count the same', () => {
    fc.assert(fc.property(day, fc.integer({ min: -4000, max: 4000 }), (from, days) => daysBetween(from, addDays(from, days)) === days))
  })
})

describe('lapse', () => {
  const until = addDays('2026-01-10', 182)
  it('holds up to the day before, is refresh due for thirty days, and drops on the day', () => {
    expect(lapse(row(4, '2026-01-10'), USUAL_SETTINGS, addDays(until, -31))).toEqual({ level: 4, state: 'held', until })
    expect(lapse(row(4, '2026-01-10'), USUAL_SETTINGS, addDays(until, -30))).toEqual({ level: 4, state: 'refresh-due', until })
    expect(lapse(row(4, '2026-01-10'), USUAL_SETTINGS, addDays(until, -1))).toEqual({ level: 4, state: 'refresh-due', until })
    expect(lapse(row(4, '2026-01-10'), USUAL_SETTINGS, until)).toEqual({ level: 3, state: 'lapsed', until })
  })
  it('drops 5, 4 and 3 by one, once, and leaves 2, 1 and 0', () => {
    const later = addDays(until, 3000)
    expect([5, 4, 3, 2, 1, 0].map(level => lapse(row(level, '2026-01-10'), USUAL_SETTINGS, later).level)).toEqual([4, 3, 2, 2, 1, 0])
    expect(lapse(row(2, '2026-01-10'), USUAL_SETTINGS, later)).toEqual({ level: 2, state: 'held', until: null })
  })
  it('drops on the day of the studio, which begins at other moments in other zones', () => {
    const moment = new Date(`${addDays(until, -1)}T23:30:00Z`)
    expect(lapse(row(4, '2026-01-10'), USUAL_SETTINGS, dayIn('Europe/London', moment)).state).toBe('lapsed')
    expect(lapse(row(4, '2026-01-10'), USUAL_SETTINGS, dayIn('America/New_York', moment)).state).toBe('refresh-due')
  })
  it('takes the usual life where none is kept with the level', () => {
    expect(lapse(row(4, '2026-01-10', null), { ...USUAL_SETTINGS, usualKeeps: 10 }, '2026-01-20').state).toBe('lapsed')
  })
  it('never gives more as days go by, and never more than was signed', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 5 }), day, fc.integer({ min: 1, max: 1000 }), day, fc.nat(2000), (level, alive, keeps, today, later) => {
      const first = lapse(row(level, alive, keeps), USUAL_SETTINGS, today).level
      const then = lapse(row(level, alive, keeps), USUAL_SETTINGS, addDays(today, later)).level
      return then <= first && first <= level && then >= Math.min(level, Math.max(level - 1, 0))
    }))
  })
})

describe('settings', () => {
  it('are those of the day asked for', () => {
    const rows = [{ fromAt: new Date('2026-02-01T00:00:00Z'), value: { piecesFor3: 4 } }, { fromAt: new Date('2026-01-01T00:00:00Z'), value: { piecesFor3: 3 } }]
    expect(settingsAt(rows, new Date('2025-12-31T00:00:00Z'))).toEqual(USUAL_SETTINGS)
    expect(settingsAt(rows, new Date('2026-01-15T00:00:00Z')).piecesFor3).toBe(3)
    expect(settingsAt(rows, new Date('2026-02-01T00:00:00Z'))).toEqual({ ...USUAL_SETTINGS, piecesFor3: 4 })
  })
  it('fall back to the usual where a row cannot be read', () => {
    expect(settingsAt([{ fromAt: new Date(0), value: { piecesFor3: -1 } }], new Date())).toEqual(USUAL_SETTINGS)
    expect(settingsAt([{ fromAt: new Date(0), value: { unheard: 1 } }], new Date())).toEqual(USUAL_SETTINGS)
  })
})
