import { describe, expect, it } from 'vitest'
import { foundingReasons, secondNameReasons, type SecondNameFacts } from '#shared/judging/names'
import { maySign } from '#shared/judging/signer'
import { USUAL_SETTINGS } from '#shared/judging/settings'
import { FIVE, held, TODAY } from './facts'

const facts = (more: Partial<SecondNameFacts> = {}): SecondNameFacts => ({
  settings: USUAL_SETTINGS, today: TODAY, tie: null, signer: { personId: 'imran', roles: ['instructor'], held: held(4) }, maker: { personId: 'dev', name: 'Dev' },
  signOff: { by: 'ruth', level: 4, kind: 'sign', isInForce: true }, named: [], ...more,
})
const codes = (more: Partial<SecondNameFacts> = {}) => secondNameReasons(facts(more)).map(reason => reason.code)
const imran = (more: Parameters<typeof held>[1] = {}, level = 4) => ({ personId: 'imran', roles: ['instructor'] as const, held: held(level, more) })

describe('the second name', () => {
  it('is given by another instructor who holds 4 or more', () => {
    expect(codes()).toEqual([])
    expect(codes({ signer: imran({}, 5) })).toEqual([])
    expect(codes({ signer: imran({}, 3) })).toEqual(['not-four'])
    expect(codes({ signer: imran({ aliveOn: '2025-01-01' }) })).toEqual(['not-four'])
    expect(codes({ signer: imran({ oneSignature: true }) })).toEqual(['not-four'])
    expect(codes({ signer: { personId: 'amy', roles: ['apprentice'], held: held(4) } })).toEqual(['not-instructor'])
  })
  it('is not the first signer, the maker, or somebody tied to the maker', () => {
    expect(codes({ signer: { personId: 'ruth', roles: ['instructor'], held: FIVE } })).toEqual(['first-name'])
    expect(codes({ maker: { personId: 'imran', name: 'Imran' } })).toEqual(['own-work'])
    expect(codes({ tie: 'partner' })).toEqual(['tie'])
  })
  it('is given once, from level 4, to what is in force', () => {
    expect(codes({ named: ['dilys'] })).toEqual(['named-twice'])
    expect(codes({ signOff: { by: 'ruth', level: 3, kind: 'sign', isInForce: true } })).toEqual(['no-second-name'])
    expect(codes({ signOff: { by: 'owen', level: 5, kind: 'founding', isInForce: true } })).toEqual(['no-second-name'])
    expect(codes({ signOff: { by: 'ruth', level: 4, kind: 'sign', isInForce: false } })).toEqual(['no-second-name'])
  })
})

describe('the founding level', () => {
  const found = (more: Partial<Parameters<typeof foundingReasons>[0]> = {}) =>
    foundingReasons({ roles: ['manager'], holder: { name: 'Ruth', roles: ['instructor'] }, isHeld: false, ...more }).map(reason => reason.code)
  it('is the manager’s, to an instructor, where nobody holds 5', () => {
    expect(found()).toEqual([])
    expect(found({ roles: ['instructor'] })).toEqual(['not-manager'])
    expect(found({ holder: { name: 'Amy', roles: ['apprentice'] } })).toEqual(['not-teaching'])
    expect(found({ isHeld: true })).toEqual(['founded'])
  })
})

describe('what the list of looks says', () => {
  it('is sign, countersign or not you with the reason', () => {
    const { settings, today, tie, maker } = facts()
    const says = (signer: SecondNameFacts['signer']) => maySign({ settings, today, tie, maker, signer })
    expect(says({ personId: 'ruth', roles: ['instructor'], held: FIVE })).toEqual({ may: 'sign' })
    expect(says(imran())).toEqual({ may: 'countersign' })
    expect(says(imran({}, 3))).toEqual({ may: 'not', because: 'To sign in this lesson you hold May teach, 5, in it yourself.' })
    expect(says({ personId: 'dev', roles: ['instructor'], held: FIVE })).toEqual({ may: 'not', because: 'Nobody signs their own work.' })
  })
})
