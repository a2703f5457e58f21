import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { aliveUntil, inForce, isBlank, standingOf, type PieceFact, type SignFact, type StandingFacts } from '#shared/judging/standing'

const at = (day: string, hour = 10) => new Date(`${day}T${String(hour).padStart(2, '0')}:00:00Z`)
const sign = (id: string, level: number, day: string, more: Partial<SignFact> = {}): SignFact => ({ id, of: id, kind: 'sign', level, at: at(day), day, keeps: 182, ...more })
const piece = (id: string, finishedOn: string | null, more: Partial<PieceFact> = {}): PieceFact => ({
  id, status: finishedOn ? 'judged' : 'at-bench', startedAt: at(finishedOn ?? '2026-01-01', 9), finishedOn, waitingSince: null, turnsDone: 4, turnsAll: 14, ...more,
})
const facts = (more: Partial<StandingFacts>): StandingFacts => ({ signs: [], pieces: [], judged: [], taught: [], revisionRead: null, ...more })

describe('the sign-off in force', () => {
  it('is the last one, as corrected', () => {
    const signs = [sign('a', 2, '2026-01-01'), sign('b', 3, '2026-02-01')]
    expect(inForce(signs)?.level).toBe(3)
    expect(inForce([...signs, sign('c', 0, '2026-02-02', { kind: 'correction', of: 'b' })])?.level).toBe(2)
    expect(inForce([...signs, sign('c', 1, '2026-02-02', { kind: 'correction', of: 'b' })])?.level).toBe(1)
    expect(inForce([])).toBeNull()
  })
  it('stands on one signature at 4 until the second name, and not below 4', () => {
    const four = sign('a', 4, '2026-01-01')
    expect(inForce([sign('x', 3, '2026-01-01')])?.oneSignature).toBe(false)
    expect(inForce([four])?.oneSignature).toBe(true)
    expect(inForce([four, sign('b', 4, '2026-01-02', { kind: 'countersign', of: 'a' })])?.oneSignature).toBe(false)
    expect(inForce([four, sign('b', 4, '2026-01-02', { kind: 'countersign', of: 'another' })])?.oneSignature).toBe(true)
  })
  it('keeps its second name through a refresh, but not on the way from 4 to 5', () => {
    const whole = [sign('a', 4, '2026-01-01'), sign('b', 4, '2026-01-02', { kind: 'countersign', of: 'a' })]
    expect(inForce([...whole, sign('c', 4, '2026-08-01', { kind: 'refresh' })])?.oneSignature).toBe(false)
    expect(inForce([...whole, sign('c', 5, '2026-08-01')])?.oneSignature).toBe(true)
  })
  it('says when it is a founding level, which needs no second name', () => {
    const standing = standingOf(facts({ signs: [sign('a', 5, '2026-01-01', { kind: 'founding', keeps: 365 })] }))
    expect(standing).toMatchObject({ levelSigned: 5, oneSignature: false, flags: ['founding'] })
  })
})

describe('a run of work', () => {
  it('goes on while no gap is as long as the level lives, and is not taken up again after one', () => {
    expect(aliveUntil('2026-01-01', ['2026-01-10', '2026-01-19'], 10)).toBe('2026-01-19')
    expect(aliveUntil('2026-01-01', ['2026-01-11'], 10)).toBe('2026-01-01')
    expect(aliveUntil('2026-01-01', ['2025-12-01', '2026-01-05', '2026-03-01'], 10)).toBe('2026-01-05')
  })
  it('counts days of teaching for level 5 only', () => {
    const taught = ['2026-03-01']
    expect(standingOf(facts({ signs: [sign('a', 5, '2026-01-01', { keeps: 365 })], taught })).aliveOn).toBe('2026-03-01')
    expect(standingOf(facts({ signs: [sign('a', 4, '2026-01-01')], taught })).aliveOn).toBe('2026-01-01')
  })
})

describe('a standing', () => {
  it('knows the piece at the bench and where it is', () => {
    expect(standingOf(facts({ pieces: [piece('a', null), piece('b', null, { startedAt: at('2026-02-01'), turnsDone: 6 })] })))
      .toMatchObject({ openPiece: 'b', placeNo: 7, places: 14, pieces: 0 })
    expect(standingOf(facts({ pieces: [piece('a', null, { turnsDone: 14 })] })).placeNo).toBe(14)
  })
  it('waits since the oldest piece that waits, and not for one that is judged', () => {
    const waits = piece('a', '2026-01-05', { status: 'finished', waitingSince: at('2026-01-05') })
    expect(standingOf(facts({ pieces: [piece('b', '2026-01-07', { status: 'finished', waitingSince: at('2026-01-07') }), waits] })).waitingSince).toEqual(at('2026-01-05'))
    expect(standingOf(facts({ pieces: [piece('b', '2026-01-07', { waitingSince: at('2026-01-07') })] })).waitingSince).toBeNull()
  })
  it('says sent back until a later judgement says otherwise', () => {
    const back = { id: 'j1', outcome: 'sent-back' as const, at: at('2026-01-05'), day: '2026-01-05' }
    expect(standingOf(facts({ judged: [back] })).sentBackOn).toBe('2026-01-05')
    expect(standingOf(facts({ judged: [back, { id: 'j2', outcome: 'kept', at: at('2026-01-06'), day: '2026-01-06' }] })).sentBackOn).toBeNull()
  })
  it('is blank with no facts, and leaves out pieces put away', () => {
    expect(isBlank(standingOf(facts({})))).toBe(true)
    expect(isBlank(standingOf(facts({ pieces: [piece('a', null, { status: 'put-away' })] })))).toBe(true)
  })
  it('comes out the same in whatever order the facts are read', () => {
    const day = fc.integer({ min: 1, max: 28 }).map(n => `2026-01-${String(n).padStart(2, '0')}`)
    const signs = fc.array(fc.tuple(fc.uuid(), fc.integer({ min: 1, max: 5 }), day), { maxLength: 6 }).map(all => all.map(([id, level, on]) => sign(id, level, on)))
    const made = fc.array(fc.tuple(fc.uuid(), fc.option(day)), { maxLength: 6 }).map(all => all.map(([id, on]) => piece(id, on)))
    fc.assert(fc.property(signs, made, fc.func(fc.integer()), (s, p, order) => {
      const shuffled = <T>(list: readonly T[]): T[] => [...list].sort((a, b) => order(a) - order(b))
      expect(standingOf(facts({ signs: shuffled(s), pieces: shuffled(p) }))).toEqual(standingOf(facts({ signs: s, pieces: p })))
    }))
  })
})
