/** What stands between a person and each level, in sentences. The server decides by this and the screen explains by it. */
import type { Permission } from '../lesson/schema'
import { daysBetween } from './days'
import { countsFor, isAside, isNo, type PieceEvidence, unmet } from './evidence'
import { lapse } from './lapse'
import { levelWords, SIGNED_LEVELS, type SignedLevel } from './levels'
import { type HeldLevel, type Pair, type Reason, signerReasons } from './signer'

export interface NeededLesson {
  slug: string
  /** Null where the studio has no such lesson. */
  title: string | null
  /** The level held in it today. */
  level: number
}
export interface HeldPermission { permission: Permission, state: 'held' | 'none' | 'suspended' }

export interface GateFacts extends Pair {
  /** The level the maker holds in this lesson, as it is on record. */
  held: HeldLevel
  needs: readonly NeededLesson[]
  permissions: readonly HeldPermission[]
  /** Pieces of the maker in this lesson judged before, oldest judgement first. */
  before: readonly PieceEvidence[]
  /** The piece in hand, with the marks given so far. */
  piece: PieceEvidence
}

export interface Gate {
  level: SignedLevel
  may: boolean
  needsSecondName: boolean
  /** Signs again the level that has lapsed or is about to. */
  isRefresh: boolean
  reasons: Reason[]
  /** The pieces it rests on. */
  counts: string[]
}

/** Every level with what is missing for it. */
export function gates(facts: GateFacts): Gate[] {
  const signer = signerReasons(facts)
  return SIGNED_LEVELS.map((level) => {
    const isRefresh = isRefreshOf(facts, level)
    const reasons = [...signer, ...heldReasons(facts, level, isRefresh), ...pieceReasons(facts, level), ...beforeReasons(facts, level)]
    if (level >= 3) reasons.push(...isRefresh ? refreshReasons(facts, level) : countReasons(facts, level))
    const needsSecondName = level >= 4 && !(isRefresh && !facts.held.oneSignature)
    return { level, may: reasons.length === 0, needsSecondName, isRefresh, reasons, counts: restsOn(facts, level).map(piece => piece.piece) }
  })
}

const all = (facts: GateFacts): PieceEvidence[] => [...facts.before.filter(piece => piece.piece !== facts.piece.piece), facts.piece]
const pieces = (count: number): string => count === 1 ? '1 piece' : `${count} pieces`

function isRefreshOf({ held, settings, today }: GateFacts, level: SignedLevel): boolean {
  return level >= 3 && held.levelSigned === level && lapse(held, settings, today).state !== 'held'
}

/** What the level held already says. */
function heldReasons({ held, settings, today, maker }: GateFacts, level: SignedLevel, isRefresh: boolean): Reason[] {
  const now = lapse(held, settings, today)
  if (isRefresh) return []
  if (held.levelSigned === level && held.oneSignature) return [{ code: 'second-awaited', says: `${levelWords(level)} stands on one signature. It waits for a second name, not for another first one.` }]
  if (level === now.level && now.state !== 'lapsed') return [{ code: 'held-already', says: `${maker.name} holds this already.` }]
  if (level < now.level) return [{ code: 'lower', says: `${maker.name} holds ${levelWords(now.level)}. A level is not taken back by signing a lower one.` }]
  return []
}

/** What this one piece says against a level. */
function pieceReasons({ piece, settings }: GateFacts, level: SignedLevel): Reason[] {
  if (level === 1) return []
  if (piece.outcome !== 'kept') return [{ code: 'not-kept', says: 'This piece is not kept.' }]
  if (level === 2) return []
  const reasons: Reason[] = []
  if (!piece.covered) reasons.push({ code: 'not-covered', says: 'Its sizes are outside what the lesson covers, so it is practice and does not count.' })
  if (piece.misses >= settings.missesSpoil) reasons.push({ code: 'misses', says: `One hold point was missed ${piece.misses} times, so it counts for nothing above level 2.` })
  if (piece.seen === 'photo') reasons.push({ code: 'photo-only', says: 'A photo alone is never enough above level 2.' })
  const lacking = unmet(piece, level).map(line => ({ ...line, verdict: line.by === 'judge' ? line.said : line.inside[level] ?? null, isUnseen: line.live && (piece.seen === 'piece' || piece.seen === 'photo') }))
  const unmarked = lacking.filter(line => line.verdict === null && !line.isUnseen)
  if (unmarked.length > 1) reasons.push({ code: 'essential', says: `${unmarked.length} essential lines are not marked yet.` })
  for (const line of lacking) if (unmarked.length <= 1 || !unmarked.includes(line)) reasons.push({ code: 'essential', says: saysOfUnmet(line) })
  return reasons
}

function saysOfUnmet({ says, isUnseen, verdict }: { says: string, isUnseen: boolean, verdict: string | boolean | null }): string {
  const line = `Essential: “${says}”`
  if (isUnseen) return `${line} is seen live or not at all, and this piece was not.`
  if (verdict === null) return `${line} is not marked yet.`
  return verdict === false ? `${line} is outside at this level.` : `${line} is marked ${verdict}.`
}

/** What must be held before: the lessons that come first, and the permissions. */
function beforeReasons({ needs, permissions, settings, maker }: GateFacts, level: SignedLevel): Reason[] {
  if (level < 2) return []
  const reasons: Reason[] = []
  for (const need of needs) {
    if (need.title === null) reasons.push({ code: 'needs', says: `It needs “${need.slug}”, which is not a lesson of this studio. Bring that lesson in, or take it out of what this one needs.` })
    else if (need.level < settings.neededLevel) reasons.push({ code: 'needs', says: `It needs ${need.title} at ${settings.neededLevel}; ${maker.name} holds ${need.level} in it today.` })
  }
  for (const { permission, state } of permissions) {
    if (state === 'suspended') reasons.push({ code: 'permission', says: `${maker.name}’s permission for ${permission} is suspended.` })
    else if (state === 'none' && level >= 3) reasons.push({ code: 'permission', says: `${maker.name} has no permission for ${permission} yet.` })
  }
  return reasons
}

/** For 3 the last pieces running; for more, every piece that counts. */
function restsOn(facts: GateFacts, level: SignedLevel): PieceEvidence[] {
  if (level <= 2) return [facts.piece]
  if (isRefreshOf(facts, level)) return all(facts).filter(piece => countsFor(piece, level, facts.settings) && piece.day >= sinceOf(facts))
  if (level === 3) return running(facts).filter(piece => countsFor(piece, level, facts.settings))
  return all(facts).filter(piece => countsFor(piece, level, facts.settings))
}

const running = (facts: GateFacts): PieceEvidence[] =>
  facts.settings.piecesFor3 === 0 ? [] : all(facts).filter(piece => !isAside(piece, facts.settings)).slice(-facts.settings.piecesFor3)

function countReasons(facts: GateFacts, level: SignedLevel): Reason[] {
  if (level === 3) return runReasons(facts)
  return level === 4 ? spreadReasons(facts) : teachReasons(facts)
}

function runReasons(facts: GateFacts): Reason[] {
  const { settings } = facts
  const window = running(facts)
  const good = window.filter(piece => countsFor(piece, 3, settings))
  if (window.length < settings.piecesFor3) return [{ code: 'pieces', says: `It takes ${pieces(settings.piecesFor3)} running that meet every essential; there ${good.length === 1 ? 'is' : 'are'} ${good.length}.` }]
  if (good.length < window.length) {
    const bad = window.filter(piece => !countsFor(piece, 3, settings)).map(piece => piece.label).join(', ')
    return [{ code: 'running', says: `It takes ${pieces(settings.piecesFor3)} running that meet every essential; ${bad} did not.` }]
  }
  const twice = good.flatMap(piece => piece.lines.filter(line => isNo(line, 3))).filter((line, i, lines) => lines.findIndex(one => one.key === line.key) < i)
  return [...new Set(twice.map(line => line.says))].map(says => ({ code: 'no-twice', says: `“${says}” is no in more than one of these pieces.` }))
}

function spreadReasons(facts: GateFacts): Reason[] {
  const { settings } = facts
  const good = restsOn(facts, 4)
  const days = [...new Set(good.map(piece => piece.day))].sort()
  const apart = days.length > 0 ? daysBetween(days[0] ?? '', days.at(-1) ?? '') : 0
  const whole = good.filter(piece => piece.seen === 'whole').length
  const reasons: Reason[] = []
  if (good.length < settings.piecesFor4) reasons.push({ code: 'pieces', says: `It takes ${pieces(settings.piecesFor4)} that meet every essential; there ${good.length === 1 ? 'is' : 'are'} ${good.length}.` })
  if (days.length < settings.daysFor4) reasons.push({ code: 'days', says: `They are made on at least ${settings.daysFor4} days; so far on ${days.length}.` })
  if (apart < settings.apartFor4) reasons.push({ code: 'apart', says: `From the first to the last it takes ${settings.apartFor4} days or more; so far ${apart}.` })
  if (whole < settings.seenWholeFor4) reasons.push({ code: 'seen-whole', says: settings.seenWholeFor4 === 1 ? 'One of them is seen from start to finish; none was yet.' : `${settings.seenWholeFor4} of them are seen from start to finish; so far ${whole}.` })
  return reasons
}

function teachReasons(facts: GateFacts): Reason[] {
  const { held, settings, today } = facts
  const reasons: Reason[] = []
  const good = restsOn(facts, 5)
  if (lapse(held, settings, today).level < 4 || held.oneSignature) reasons.push({ code: 'four-first', says: `${levelWords(4)} comes first, with both names and not lapsed.` })
  if (good.length < settings.piecesFor5) reasons.push({ code: 'pieces', says: `It takes ${pieces(settings.piecesFor5)} that meet every essential; there ${good.length === 1 ? 'is' : 'are'} ${good.length}.` })
  return reasons
}

/** The first day whose pieces refresh a level: the day it lapsed; before that, any piece of now. */
function sinceOf({ held, settings, today, piece }: GateFacts): string {
  const now = lapse(held, settings, today)
  return now.state === 'lapsed' && now.until !== null ? now.until : piece.day
}

/** One piece brings a level back; after a long time lapsed, two. */
function refreshReasons(facts: GateFacts, level: SignedLevel): Reason[] {
  const { held, settings, today } = facts
  const now = lapse(held, settings, today)
  const isLong = now.state === 'lapsed' && now.until !== null && daysBetween(now.until, today) > settings.longLapsed
  const good = restsOn(facts, level).length
  if (facts.piece.day < sinceOf(facts)) return [{ code: 'pieces', says: 'This piece was finished before the level lapsed; it takes one made since.' }]
  return isLong && good < 2 ? [{ code: 'long-lapsed', says: `It lapsed more than ${settings.longLapsed} days ago: two pieces bring it back; there ${good === 1 ? 'is' : 'are'} ${good}.` }] : []
}
