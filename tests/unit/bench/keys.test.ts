import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { KEPT_FROM_MS, KEPT_TO_MS, keptDown, type KeyAct, type KeyScreen, type KeyState, KEY_WAYS, letGo, NO_KEYS, press, release, REST_MS, SHORT_MS, walk } from '../../../shared/bench/keys'

const step: KeyScreen = { id: 'step 1', walks: false }
const hold: KeyScreen = { id: 'hold 1', walks: true }

/** Presses and lets go a key on one screen; gives what was done. */
function tap(state: KeyState, code: string, at: number, kept: number, screen: KeyScreen, up: KeyScreen = screen): { state: KeyState, acts: KeyAct[] } {
  const down = press(state, { code, at, repeat: false }, screen)
  const end = release(down.state, { code, at: at + kept }, up)
  return { state: end.state, acts: [down.act, end.act].filter(act => act !== null) }
}

describe('on a step', () => {
  it('goes on and back at the press, by every key a pedal sends', () => {
    for (const code of ['PageDown', 'ArrowRight', 'ArrowDown']) expect(tap(NO_KEYS, code, 0, 50, step).acts).toEqual(['next'])
    for (const code of ['PageUp', 'ArrowLeft', 'ArrowUp']) expect(tap(NO_KEYS, code, 0, 50, step).acts).toEqual(['back'])
  })
  it('does once for a key kept down, however often it repeats', () => {
    let { state } = press(NO_KEYS, { code: 'PageDown', at: 0, repeat: false }, step)
    for (let at = 500; at < 5000; at += 30) {
      const again = press(state, { code: 'PageDown', at, repeat: true }, step)
      expect(again.act).toBeNull()
      state = again.state
    }
    expect(release(state, { code: 'PageDown', at: 5000 }, step).act).toBeNull()
  })
  it('wants the key up before the next press counts, even where no repeat is said', () => {
    const { state } = press(NO_KEYS, { code: 'PageDown', at: 0, repeat: false }, step)
    expect(press(state, { code: 'PageDown', at: 900, repeat: false }, step).act).toBeNull()
  })
  it('drops what bounces within the rest, and takes the first after it', () => {
    const { state } = tap(NO_KEYS, 'PageDown', 0, 20, step)
    expect(tap(state, 'PageDown', REST_MS - 1, 20, step).acts).toEqual([])
    expect(tap(state, 'PageDown', REST_MS, 20, step).acts).toEqual(['next'])
  })
  it('does not go on by Enter, nor by Space', () => {
    expect(tap(NO_KEYS, 'Enter', 0, 50, step).acts).toEqual([])
    expect(tap(NO_KEYS, 'Space', 0, 50, step).acts).toEqual([])
  })
  it('forgets a key that went down before the window lost it', () => {
    const { state } = press(NO_KEYS, { code: 'PageDown', at: 0, repeat: false }, step)
    expect(press(letGo(state), { code: 'PageDown', at: 1000, repeat: false }, step).act).toBe('next')
  })
})

describe('where something is asked', () => {
  it('walks by short presses', () => {
    expect(tap(NO_KEYS, 'PageDown', 0, SHORT_MS - 1, hold).acts).toEqual(['walk-on'])
    expect(tap(NO_KEYS, 'PageUp', 0, 0, hold).acts).toEqual(['walk-back'])
  })
  it('says the lit one when let go between the limits, and does nothing outside them', () => {
    for (const kept of [KEPT_FROM_MS, 1400, KEPT_TO_MS]) expect(tap(NO_KEYS, 'PageDown', 0, kept, hold).acts).toEqual(['say'])
    for (const kept of [SHORT_MS, KEPT_FROM_MS - 1, KEPT_TO_MS + 1, 60_000]) expect(tap(NO_KEYS, 'PageDown', 0, kept, hold).acts).toEqual([])
  })
  it('says the lit one by Enter', () => {
    expect(tap(NO_KEYS, 'Enter', 0, 20, hold).acts).toEqual(['say'])
  })
  it('gives no meaning to a press that began on another screen', () => {
    expect(tap(NO_KEYS, 'PageDown', 0, 1000, step, hold).acts).toEqual(['next'])
    expect(tap(NO_KEYS, 'PageDown', 0, 1000, { id: 'hold 0', walks: true }, hold).acts).toEqual([])
  })
  it('shows how far the press has come only while letting go would say it', () => {
    const { state } = press(NO_KEYS, { code: 'PageDown', at: 0, repeat: false }, hold)
    expect(keptDown(state, 100, hold)).toBeNull()
    expect(keptDown(state, 600, hold)).toEqual({ part: 0.5, inTime: false })
    expect(keptDown(state, 1000, hold)).toEqual({ part: 1, inTime: true })
    expect(keptDown(state, 2500, hold)).toBeNull()
    expect(keptDown(state, 1000, { ...hold, id: 'hold 2' })).toBeNull()
  })
  it('asks for help by its key on every screen', () => {
    expect(tap(NO_KEYS, 'KeyH', 0, 20, hold).acts).toEqual(['help'])
    expect(tap(NO_KEYS, 'KeyH', 0, 20, step).acts).toEqual(['help'])
  })
})

const pedals = Object.entries(KEY_WAYS).filter(([, way]) => way === 'next' || way === 'back').map(([code]) => code)
const presses = fc.array(fc.record({ code: fc.constantFrom(...pedals), wait: fc.integer({ min: 0, max: 3000 }), kept: fc.integer({ min: 0, max: SHORT_MS * 2 - 1 }), bounces: fc.integer({ min: 0, max: 3 }) }), { maxLength: 60 })

describe('any list of presses', () => {
  it('never says an answer while each is shorter than the kept one', () => {
    fc.assert(fc.property(presses, fc.boolean(), (list, walks) => {
      let state = NO_KEYS
      let at = 0
      for (const one of list) {
        at += one.wait
        const { state: after, acts } = tap(state, one.code, at, Math.min(one.kept, KEPT_FROM_MS - 1), { id: 'a', walks })
        expect(acts).not.toContain('say')
        state = after
        at += one.kept
        for (let i = 0; i < one.bounces; i++) { const bounced = tap(state, one.code, ++at, 1, { id: 'a', walks }); expect(bounced.acts).not.toContain('say'); state = bounced.state }
      }
    }))
  })
  it('never acts twice within the rest, and never more often than keys went down', () => {
    const kept = fc.array(fc.record({ code: fc.constantFrom(...Object.keys(KEY_WAYS)), wait: fc.integer({ min: 0, max: 700 }), kept: fc.integer({ min: 0, max: 2500 }), walks: fc.boolean() }), { maxLength: 60 })
    fc.assert(fc.property(kept, (list) => {
      let state = NO_KEYS
      let at = 0
      let last = -Infinity
      for (const one of list) {
        at += one.wait
        const screen = { id: String(one.walks), walks: one.walks }
        const down = press(state, { code: one.code, at, repeat: false }, screen)
        if (down.act) { expect(at - last).toBeGreaterThanOrEqual(REST_MS); last = at }
        at += one.kept
        const up = release(down.state, { code: one.code, at }, screen)
        expect(down.act !== null && up.act !== null).toBe(false)
        if (up.act) last = at
        state = up.state
        expect(state.down).toBeNull()
      }
    }))
  })
})

describe('the walk', () => {
  it('begins at either end from nothing lit, goes round, and stands still with one stop', () => {
    expect(walk(['a', 'b', 'c'], null, 1)).toBe('a')
    expect(walk(['a', 'b', 'c'], null, -1)).toBe('c')
    expect(walk(['a', 'b', 'c'], 'c', 1)).toBe('a')
    expect(walk(['a', 'b', 'c'], 'a', -1)).toBe('c')
    expect(walk(['a'], 'a', 1)).toBe('a')
    expect(walk([], 'a', 1)).toBeNull()
    expect(walk(['a', 'b'], 'gone', 1)).toBe('a')
  })
})
