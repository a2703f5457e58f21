import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countsFor, type EvidenceLine, isNo, type PieceEvidence } from '#shared/judging/evidence'
import { type GateFacts, gates } from '#shared/judging/gates'
import { USUAL_SETTINGS } from '#shared/judging/settings'
import { OUTCOMES, RELATION_KINDS, ROLES, SAYS, SEEN, type Says } from '#shared/schemas/lists'
import { addDays } from '#shared/judging/days'
import { TODAY } from './facts'

const KEYS = ['a', 'b', 'c', 'd']
const mark: fc.Arbitrary<EvidenceLine[]> = fc.tuple(...KEYS.map(() => fc.record({ said: fc.constantFrom(...SAYS, null), from: fc.integer({ min: 0, max: 6 }) }))).map(marks =>
  // c and d are measured; a tolerance is never wider at a higher level, so a line is inside up to some level.
  marks.map((one, i) => ({
    key: KEYS[i] ?? '', says: KEYS[i] ?? '', essential: i % 2 === 0, live: false, by: i < 2 ? 'judge' as const : 'measure' as const, said: i < 2 ? one.said : null,
    inside: [0, 1, 2, 3, 4, 5].map(level => level < one.from),
  })))
const evidence = (name: string) => fc.record({
  piece: fc.constant(name), label: fc.constant(name), day: fc.integer({ min: -900, max: 0 }).map(days => addDays(TODAY, days)), outcome: fc.constantFrom(...OUTCOMES),
  seen: fc.constantFrom(...SEEN), covered: fc.boolean(), misses: fc.integer({ min: 0, max: 4 }), lines: mark,
})
const good = (name: string) => fc.tuple(evidence(name), fc.integer({ min: 0, max: 9 })).map(([one, luck]): PieceEvidence => luck < 3
  ? one
  : { ...one, outcome: 'kept', covered: true, misses: 0, seen: luck < 6 ? 'whole' : 'holds', lines: one.lines.map(line => line.essential ? { ...line, said: line.by === 'judge' ? 'yes' : null, inside: [true, true, true, true, true, true] } : line) })
const level = fc.record({ levelSigned: fc.integer({ min: 0, max: 5 }), aliveOn: fc.integer({ min: -900, max: 0 }).map(days => addDays(TODAY, days)), keeps: fc.constantFrom(182, 365, null), oneSignature: fc.boolean() })
const roles = fc.subarray([...ROLES])
const any: fc.Arbitrary<GateFacts> = fc.record({
  settings: fc.constant(USUAL_SETTINGS), today: fc.constant(TODAY), tie: fc.option(fc.constantFrom(...RELATION_KINDS), { freq: 8 }),
  signer: fc.record({ personId: fc.constantFrom('ruth', 'dev'), roles, held: fc.oneof(level, fc.constant({ levelSigned: 5, aliveOn: TODAY, keeps: 365, oneSignature: false })) }),
  maker: fc.constant({ personId: 'dev', name: 'Dev' }), held: level, needs: fc.constant([]), permissions: fc.constant([]),
  before: fc.integer({ min: 0, max: 11 }).chain(count => fc.tuple(...Array.from({ length: count }, (_, i) => good(`p${i}`)))), piece: good('now'),
})
const able = any.map((facts): GateFacts => ({ ...facts, tie: null, signer: { personId: 'ruth', roles: ['instructor'], held: { levelSigned: 5, aliveOn: TODAY, keeps: 365, oneSignature: false } } }))
const openLevels = (facts: GateFacts): number[] => gates(facts).filter(gate => gate.may).map(gate => gate.level)
const opened = (from: GateFacts, to: GateFacts): number[] => openLevels(to).filter(one => !openLevels(from).includes(one))
const worse: Record<Says, Says> = { yes: 'nearly', nearly: 'no', no: 'no' }
const worsen = (piece: PieceEvidence, i: number): PieceEvidence => ({
  ...piece, lines: piece.lines.map((line, at) => at !== i ? line : { ...line, said: line.said === null ? null : worse[line.said], inside: line.inside.map((inside, l) => l >= 3 ? false : inside) }),
})

describe('gates, whatever the facts', () => {
  it('never open for the maker, for one tied to the maker, or for one who is no instructor with 5', () => {
    fc.assert(fc.property(any, (facts) => {
      if (openLevels(facts).length === 0) return
      expect(facts.signer.personId).not.toBe(facts.maker.personId)
      expect(facts.tie).toBeNull()
      expect(facts.signer.roles).toContain('instructor')
      expect(facts.signer.held.levelSigned).toBe(5)
      expect(facts.signer.held.oneSignature).toBe(false)
    }), { numRuns: 2000 })
  })
  it('say why they are shut, and only then', () => {
    fc.assert(fc.property(any, facts => gates(facts).every(gate => gate.may === (gate.reasons.length === 0) && gate.reasons.every(reason => reason.says.endsWith('.')))))
  })
  it('never open when a piece that counts is taken away', () => {
    let tried = 0
    fc.assert(fc.property(able, fc.nat(), (facts, which) => {
      const taken = facts.before[which % Math.max(facts.before.length, 1)]
      if (!taken || taken.lines.some(line => isNo(line, 3))) return
      const without = { ...facts, before: facts.before.filter(piece => piece !== taken) }
      for (const one of opened(facts, without)) expect(countsFor(taken, one, facts.settings)).toBe(false)
      tried++
    }), { numRuns: 3000 })
    expect(tried).toBeGreaterThan(200)
  })
  it('never open when a mark turns worse, on this piece or on one before', () => {
    fc.assert(fc.property(able, fc.nat(), fc.integer({ min: 0, max: 3 }), (facts, which, i) => {
      const to = which % (facts.before.length + 1)
      const after: GateFacts = to === facts.before.length ? { ...facts, piece: worsen(facts.piece, i) } : { ...facts, before: facts.before.map((piece, at) => at === to ? worsen(piece, i) : piece) }
      expect(opened(facts, after)).toEqual([])
    }), { numRuns: 3000 })
  })
  it('above level 2 rest only on pieces that are kept, covered, seen by eye and meet every essential', () => {
    let seen = 0
    fc.assert(fc.property(able, (facts) => {
      for (const gate of gates(facts).filter(one => one.may && one.level >= 3)) {
        seen++
        const rests = [...facts.before, facts.piece].filter(piece => gate.counts.includes(piece.piece))
        expect(rests.length).toBeGreaterThan(0)
        expect(rests.every(piece => countsFor(piece, gate.level, facts.settings))).toBe(true)
        expect(gate.counts).toContain('now')
      }
    }), { numRuns: 2000 })
    expect(seen).toBeGreaterThan(100)
  })
  it('ask for a second name from level 4 on, unless a whole level is refreshed', () => {
    fc.assert(fc.property(able, facts => gates(facts).every(gate => gate.needsSecondName === (gate.level >= 4 && !(gate.isRefresh && !facts.held.oneSignature)))))
  })
})
