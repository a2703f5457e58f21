import { describe, expect, it } from 'vitest'
import { foldPermissions, permissionReasons, type PermissionActed, type PermissionFacts } from '#shared/judging/permissions'
import { USUAL_SETTINGS } from '#shared/judging/settings'
import { NOTHING_HELD } from '#shared/judging/signer'

const act = (permission: PermissionActed['permission'], did: PermissionActed['act'], by = 'ruth'): PermissionActed => ({ permission, act: did, by })
const facts = (acts: PermissionActed[], more: Partial<PermissionFacts> = {}): PermissionFacts =>
  ({ settings: USUAL_SETTINGS, signer: { personId: 'ruth', roles: ['instructor'], held: NOTHING_HELD }, maker: { personId: 'isaac', name: 'Isaac' }, tie: null, ageBand: 'adult', acts, ...more })
const codes = (...args: Parameters<typeof permissionReasons>) => permissionReasons(...args).map(reason => reason.code)
const imran = { personId: 'imran', roles: ['instructor'], held: NOTHING_HELD } as const

describe('permissions', () => {
  it('are what the last act of each says', () => {
    expect(foldPermissions([act('flame', 'grant'), act('motors', 'grant'), act('flame', 'suspend'), act('motors', 'withdraw')])).toEqual({ flame: 'suspended', motors: 'none' })
    expect(foldPermissions([act('flame', 'grant'), act('flame', 'suspend'), act('flame', 'limit')])).toEqual({ flame: 'held' })
  })
  it('are given by an instructor to another, not to oneself, and once', () => {
    expect(codes(facts([]), 'flame', 'grant', '')).toEqual([])
    expect(codes(facts([act('flame', 'grant')]), 'flame', 'grant', '')).toEqual(['permission'])
    expect(codes(facts([], { maker: { personId: 'ruth', name: 'Ruth' } }), 'flame', 'grant', '')).toEqual(['own-work'])
    expect(codes(facts([], { tie: 'relative' }), 'flame', 'grant', '')).toEqual(['tie'])
    expect(codes(facts([], { signer: { ...imran, roles: ['manager'] } }), 'flame', 'grant', '')).toEqual(['not-instructor'])
  })
  it('are stopped at once by any instructor, with a reason, a relative included', () => {
    const given = [act('flame', 'grant')]
    expect(codes(facts(given, { tie: 'relative' }), 'flame', 'suspend', 'Walked off with the gas on.')).toEqual([])
    expect(codes(facts(given), 'flame', 'suspend', ' ')).toEqual(['permission'])
  })
  it('are reviewed by another person than the one who suspended', () => {
    const stopped = [act('flame', 'grant', 'dilys'), act('flame', 'suspend')]
    expect(codes(facts(stopped), 'flame', 'lift', 'Seen to close three times.')).toEqual(['first-name'])
    expect(codes(facts(stopped, { signer: imran }), 'flame', 'lift', 'Seen to close three times.')).toEqual([])
    expect(codes(facts(stopped, { signer: imran }), 'flame', 'limit', 'Torch cold.')).toEqual([])
  })
  it('are not open to the young where the studio says so, and goods not at all here', () => {
    expect(codes(facts([], { ageBand: '16-17' }), 'flame', 'grant', '')).toEqual(['permission'])
    expect(codes(facts([], { ageBand: '16-17' }), 'pickle', 'grant', '')).toEqual([])
    expect(codes(facts([]), 'goods', 'grant', '')).toEqual(['permission'])
  })
})
