import type { EvidenceLine, PieceEvidence } from '#shared/judging/evidence'
import type { GateFacts } from '#shared/judging/gates'
import { USUAL_SETTINGS } from '#shared/judging/settings'
import { type HeldLevel, NOTHING_HELD } from '#shared/judging/signer'
import type { Says } from '#shared/schemas/lists'

export const TODAY = '2026-03-01'
export const FIVE: HeldLevel = { levelSigned: 5, aliveOn: '2026-02-20', keeps: 365, oneSignature: false }
export const held = (levelSigned: number, more: Partial<HeldLevel> = {}): HeldLevel => ({ levelSigned, aliveOn: '2026-02-20', keeps: 182, oneSignature: false, ...more })

export const line = (key: string, said: Says | null, more: Partial<EvidenceLine> = {}): EvidenceLine =>
  ({ key, says: `Line ${key}`, essential: false, live: false, by: 'judge', said, inside: [], ...more })
export const essential = (key: string, said: Says | null): EvidenceLine => line(key, said, { essential: true })
export const measured = (key: string, inside: readonly (boolean | null)[], isEssential = false): EvidenceLine =>
  line(key, null, { by: 'measure', inside, essential: isEssential })

export const piece = (name: string, day: string, more: Partial<PieceEvidence> = {}): PieceEvidence =>
  ({ piece: name, label: `DEV-WL-${name}`, day, outcome: 'kept', seen: 'holds', covered: true, misses: 0, lines: [essential('bead', 'yes'), line('plane', 'yes')], ...more })

export const facts = (more: Partial<GateFacts> = {}): GateFacts => ({
  settings: USUAL_SETTINGS, today: TODAY, tie: null,
  signer: { personId: 'ruth', roles: ['instructor'], held: FIVE }, maker: { personId: 'dev', name: 'Dev' },
  held: NOTHING_HELD, needs: [], permissions: [], before: [], piece: piece('4', TODAY), ...more,
})
