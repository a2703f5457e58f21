/** Who may put their name to whose work. */
import type { RelationKind, Role } from '../schemas/lists'
import { lapse, type SignedRow } from './lapse'
import { may } from './roles'
import type { JudgingSettings } from './settings'

export const REASON_CODES = ['own-work', 'tie', 'not-instructor', 'not-five', 'signer-lapsed', 'signer-one-name', 'not-four', 'first-name', 'no-second-name', 'named-twice',
  'not-kept', 'held-already', 'lower', 'second-awaited', 'needs', 'permission', 'essential', 'photo-only', 'not-covered', 'misses', 'pieces', 'running', 'no-twice', 'days', 'apart',
  'seen-whole', 'long-lapsed', 'four-first', 'founded', 'not-manager', 'not-teaching'] as const
export type ReasonCode = (typeof REASON_CODES)[number]
/** Why not, in a sentence for the screen. */
export interface Reason { code: ReasonCode, says: string }

/** A level as it is on record, with whether it still waits for its second name. */
export interface HeldLevel extends SignedRow { oneSignature: boolean }
export const NOTHING_HELD: HeldLevel = { levelSigned: 0, aliveOn: null, keeps: null, oneSignature: false }

export interface Signer { personId: string, roles: readonly Role[], held: HeldLevel }
/** The maker of the work; `name` is used in the sentences. */
export interface Maker { personId: string, name: string }
export interface Pair { settings: JudgingSettings, today: string, signer: Signer, maker: Maker, tie: RelationKind | null }

const TIE_SAYS: Record<RelationKind, string> = { relative: 'a relative', partner: 'a partner', employer: 'an employer' }

/** What a level is worth for signing others: as lapsed today, and one less while it stands on one signature. */
export function standsAt(held: HeldLevel, settings: JudgingSettings, today: string): number {
  const { level } = lapse(held, settings, today)
  return held.oneSignature && level >= 4 ? level - 1 : level
}

/** What forbids this pair, whatever the level: own work, a declared tie, or not an instructor here. */
export function pairReasons({ settings, signer, maker, tie }: Omit<Pair, 'today'>): Reason[] {
  const reasons: Reason[] = []
  if (signer.personId === maker.personId) reasons.push({ code: 'own-work', says: 'Nobody signs their own work.' })
  if (tie !== null && settings.tiesForbid.includes(tie)) reasons.push({ code: 'tie', says: `You are on record as ${TIE_SAYS[tie]} of ${maker.name}. Ask another instructor.` })
  if (!may(signer.roles, 'sign')) reasons.push({ code: 'not-instructor', says: 'Only an instructor of this studio signs.' })
  return reasons
}

/** What keeps this person from a first signature in this lesson; empty when nothing does. */
export function signerReasons(pair: Pair): Reason[] {
  const reasons = pairReasons(pair)
  const { signer, settings, today } = pair
  if (standsAt(signer.held, settings, today) >= 5) return reasons
  if (signer.held.levelSigned < 5) reasons.push({ code: 'not-five', says: 'To sign in this lesson you hold May teach, 5, in it yourself.' })
  else if (signer.held.oneSignature) reasons.push({ code: 'signer-one-name', says: 'Your own May teach, 5, still waits for its second name.' })
  else reasons.push({ code: 'signer-lapsed', says: 'Your own May teach, 5, has lapsed in this lesson. Have it refreshed first.' })
  return reasons
}

/** What keeps this person from giving a second name in this lesson: they hold 4 or more and are no party to it. */
export function secondSignerReasons(pair: Pair): Reason[] {
  const reasons = pairReasons(pair)
  if (standsAt(pair.signer.held, pair.settings, pair.today) < 4) reasons.push({ code: 'not-four', says: 'A second name is given by an instructor who holds On your own, 4, or more in this lesson, not lapsed.' })
  return reasons
}

export type MaySign = { may: 'sign' } | { may: 'countersign' } | { may: 'not', because: string }

/** One word for the list of looks: "you may sign", "you may countersign", or "not you" with the reason. */
export function maySign(pair: Pair): MaySign {
  const [first] = signerReasons(pair)
  if (!first) return { may: 'sign' }
  return secondSignerReasons(pair).length === 0 ? { may: 'countersign' } : { may: 'not', because: first.says }
}
