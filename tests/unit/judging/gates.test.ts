import { describe, expect, it } from 'vitest'
import { gates } from '#shared/judging/gates'
import type { ReasonCode } from '#shared/judging/signer'
import { essential, facts, held, line, measured, piece, TODAY } from './facts'

const open = (more: Parameters<typeof facts>[0] = {}): number[] => gates(facts(more)).filter(gate => gate.may).map(gate => gate.level)
const codes = (level: number, more: Parameters<typeof facts>[0] = {}): ReasonCode[] => gates(facts(more)).find(gate => gate.level === level)?.reasons.map(reason => reason.code) ?? []
const first = piece('1', '2026-02-10')
const second = piece('2', '2026-02-15')
const whole = piece('4', TODAY, { seen: 'whole' })

describe('who signs', () => {
  it('is an instructor who holds 5 there, and nobody else', () => {
    expect(open()).toEqual([1, 2])
    expect(codes(1, { signer: { personId: 'imran', roles: ['instructor'], held: held(4) } })).toEqual(['not-five'])
    expect(codes(1, { signer: { personId: 'amy', roles: ['apprentice'], held: held(5) } })).toEqual(['not-instructor'])
    expect(codes(1, { signer: { personId: 'owen', roles: ['manager'], held: held(5) } })).toEqual(['not-instructor'])
  })
  it('is not one whose 5 has lapsed, or stands on one signature', () => {
    expect(codes(1, { signer: { personId: 'dilys', roles: ['instructor'], held: held(5, { aliveOn: '2025-01-01' }) } })).toEqual(['signer-lapsed'])
    expect(codes(1, { signer: { personId: 'dilys', roles: ['instructor'], held: held(5, { oneSignature: true }) } })).toEqual(['signer-one-name'])
  })
  it('is never the maker, nor somebody tied to the maker', () => {
    expect(codes(3, { maker: { personId: 'ruth', name: 'Ruth' }, before: [first] })).toEqual(['own-work'])
    for (const tie of ['relative', 'partner', 'employer'] as const) expect(codes(3, { tie, before: [first] })).toEqual(['tie'])
  })
})

describe('level 1 and 2', () => {
  it('1 may be given on a piece that is sent back, 2 may not', () => {
    expect(open({ piece: piece('4', TODAY, { outcome: 'sent-back' }) })).toEqual([1])
  })
  it('2 asks for what comes before at 3, as held today', () => {
    const needs = (level: number) => [{ slug: 'jump-rings', title: 'Jump rings', level }]
    expect(open({ needs: needs(3) })).toEqual([1, 2])
    expect(codes(2, { needs: needs(2) })).toEqual(['needs'])
    expect(codes(2, { needs: [{ slug: 'gone', title: null, level: 0 }] })).toEqual(['needs'])
  })
  it('2 is open while a permission is being taken, and shut while it is suspended', () => {
    expect(open({ permissions: [{ permission: 'flame', state: 'none' }] })).toEqual([1, 2])
    expect(codes(2, { permissions: [{ permission: 'flame', state: 'suspended' }] })).toEqual(['permission'])
  })
})

describe('level 3', () => {
  it('takes two pieces running that meet every essential', () => {
    expect(open({ before: [first] })).toEqual([1, 2, 3])
    expect(codes(3)).toEqual(['pieces'])
    expect(codes(3, { before: [first, piece('2', '2026-02-15', { outcome: 'sent-back' })] })).toEqual(['running'])
    expect(codes(3, { before: [piece('1', '2026-02-10', { lines: [essential('bead', 'nearly')] })] })).toEqual(['running'])
    expect(codes(3, { before: [first], piece: piece('4', TODAY, { lines: [essential('bead', 'no')] }) })).toContain('essential')
    expect(codes(3, { before: [first], piece: piece('4', TODAY, { lines: [essential('bead', null)] }) })).toContain('essential')
  })
  it('does not take one line at no in both, but takes it in one', () => {
    const withNo = (name: string, day: string) => piece(name, day, { lines: [essential('bead', 'yes'), line('plane', 'no')] })
    expect(codes(3, { before: [withNo('1', '2026-02-10')], piece: withNo('4', TODAY) })).toEqual(['no-twice'])
    expect(open({ before: [withNo('1', '2026-02-10')] })).toContain(3)
    expect(codes(3, { before: [piece('1', '2026-02-10', { lines: [line('plane', 'no')] })], piece: piece('4', TODAY, { lines: [line('bead', 'no')] }) })).toEqual([])
  })
  it('reads measured essentials with the tolerance of that level', () => {
    const wide = measured('gap', [true, true, true, false, false, false], true)
    const narrow = measured('gap', [true, true, true, true, true, true], true)
    expect(codes(3, { before: [piece('1', '2026-02-10', { lines: [narrow] })], piece: piece('4', TODAY, { lines: [wide] }) })).toEqual(['essential', 'running'])
    expect(open({ before: [piece('1', '2026-02-10', { lines: [narrow] })], piece: piece('4', TODAY, { lines: [narrow] }) })).toContain(3)
    expect(codes(3, { before: [first], piece: piece('4', TODAY, { lines: [measured('gap', [null, null, null, null, null, null], true)] }) })).toContain('essential')
  })
  it('leaves out pieces outside the sizes, with three misses at one hold, or seen on a photo', () => {
    for (const more of [{ covered: false }, { misses: 3 }, { seen: 'photo' }] as const) {
      expect(codes(3, { before: [piece('1', '2026-02-10', more)] })).toEqual(['pieces'])
      expect(open({ before: [first, piece('2', '2026-02-15', more)] })).toContain(3)
      expect(open({ before: [first, second], piece: piece('4', TODAY, more) })).toEqual([1, 2])
    }
  })
  it('says of a line that must be seen live that it was not', () => {
    const live = { ...essential('safe', null), live: true }
    const [reason] = gates(facts({ before: [first], piece: piece('4', TODAY, { seen: 'piece', lines: [live] }) }))[2]?.reasons ?? []
    expect(reason?.says).toBe('Essential: “Line safe” is seen live or not at all, and this piece was not.')
  })
  it('asks for the permissions of the lesson', () => {
    expect(codes(3, { before: [first], permissions: [{ permission: 'flame', state: 'none' }] })).toEqual(['permission'])
    expect(open({ before: [first], permissions: [{ permission: 'flame', state: 'held' }] })).toContain(3)
  })
})

describe('level 4', () => {
  it('takes three pieces on two days, seven days from first to last, one seen whole, and a second name', () => {
    const [gate] = gates(facts({ before: [first, second], piece: whole })).filter(one => one.level === 4)
    expect(gate).toMatchObject({ may: true, needsSecondName: true, counts: ['1', '2', '4'] })
    expect(codes(4, { before: [first], piece: whole })).toEqual(['pieces'])
    expect(codes(4, { before: [first, second] })).toEqual(['seen-whole'])
  })
  it('counts the days in full: six are too few, seven are enough', () => {
    const on = (day: string) => codes(4, { before: [piece('1', '2026-02-10'), piece('2', '2026-02-11')], piece: piece('4', day, { seen: 'whole' }) })
    expect(on('2026-02-16')).toEqual(['apart'])
    expect(on('2026-02-17')).toEqual([])
    expect(codes(4, { before: [piece('1', TODAY), piece('2', TODAY)], piece: whole })).toEqual(['days', 'apart'])
  })
  it('is not given again while it waits for its second name, or while it is held', () => {
    expect(codes(4, { held: held(4, { oneSignature: true }), before: [first, second], piece: whole })).toEqual(['second-awaited'])
    expect(codes(4, { held: held(4), before: [first, second], piece: whole })).toEqual(['held-already'])
    expect(codes(3, { held: held(4), before: [first, second], piece: whole })).toEqual(['lower'])
  })
})

describe('a level that lapsed', () => {
  const gone = held(4, { aliveOn: '2025-08-01' })
  it('comes back with one piece, and keeps its second name', () => {
    expect(gates(facts({ held: gone }))[3]).toMatchObject({ may: true, isRefresh: true, needsSecondName: false, counts: ['4'] })
    expect(gates(facts({ held: { ...gone, oneSignature: true } }))[3]).toMatchObject({ may: true, needsSecondName: true })
  })
  it('takes two pieces made since, when it lapsed more than a year ago', () => {
    const long = held(4, { aliveOn: '2024-06-01' })
    expect(codes(4, { held: long })).toEqual(['long-lapsed'])
    expect(codes(4, { held: long, before: [piece('1', '2024-05-01')] })).toEqual(['long-lapsed'])
    expect(codes(4, { held: long, before: [piece('1', '2026-02-10')] })).toEqual([])
  })
  it('asks for every essential all the same', () => {
    expect(codes(4, { held: gone, piece: piece('4', TODAY, { lines: [essential('bead', 'no')] }) })).toEqual(['essential'])
  })
  it('may be refreshed in the thirty days before', () => {
    expect(gates(facts({ held: held(4, { aliveOn: '2025-09-15' }) }))[3]).toMatchObject({ may: true, isRefresh: true })
  })
})

describe('level 5', () => {
  const ten = Array.from({ length: 9 }, (_, i) => piece(`p${i}`, `2026-01-${String(i + 10)}`))
  it('takes level 4 with both names, and ten pieces', () => {
    expect(gates(facts({ held: held(4), before: ten }))[4]).toMatchObject({ may: true, needsSecondName: true })
    expect(codes(5, { held: held(4), before: ten.slice(1) })).toEqual(['pieces'])
    expect(codes(5, { held: held(4, { oneSignature: true }), before: ten })).toEqual(['four-first'])
    expect(codes(5, { held: held(3), before: ten })).toEqual(['four-first'])
  })
})
