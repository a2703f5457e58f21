/** A judgement while it is being made: what is said so far, and what follows from it. Nothing is marked beforehand. */
import type { Outcome, Says, Seen } from '../schemas/lists'
import type { PieceEvidence } from './evidence'
import { type Gate, type GateFacts, gates } from './gates'
import { canMark, evidenceLines, type Given, type MarkFault, missingMarks } from './given'
import type { SignedLevel } from './levels'
import type { Line } from './marks'

export interface Draft {
  /** Id of the judgement, made when the page opened: a double press is the same one. */
  id: string
  marks: Record<string, Given>
  seen: Seen | null
  outcome: Outcome | null
  /** Undefined: not said yet. Null: the level stays. */
  level?: SignedLevel | null
  words: string
  faults: string[]
  remake: string[]
  inHand: boolean
}

export const newDraft = (id: string): Draft => ({ id, marks: {}, seen: null, outcome: null, words: '', faults: [], remake: [], inHand: false })

/** Can this line be marked by one who saw this much? While that is not said, every line can. */
export const isOpen = (line: Pick<Line, 'live'>, seen: Seen | null): boolean => seen === null || canMark(line, seen)

/** Says how much was seen; marks of lines that one could not have seen then are taken back. */
export function withSeen(draft: Draft, lines: readonly Line[], seen: Seen): Draft {
  const kept = Object.entries(draft.marks).filter(([key]) => lines.some(line => line.key === key && canMark(line, seen)))
  return { ...draft, seen, marks: Object.fromEntries(kept) }
}

/** Marks a line, or takes the mark back when it is the same again. */
export function withMark(draft: Draft, key: string, says: Says): Draft {
  const { [key]: before, ...rest } = draft.marks
  return { ...draft, marks: before?.says === says ? rest : { ...rest, [key]: { says } } }
}

/** A measure as typed; an empty one is no measure. */
export function withMeasure(draft: Draft, key: string, typed: string): Draft {
  const { [key]: _before, ...rest } = draft.marks
  return { ...draft, marks: typed.trim() === '' ? rest : { ...rest, [key]: { value: typed.trim() } } }
}

const isLeft = (draft: Draft, line: Line): boolean => line.by === 'judge' && !line.essential && draft.marks[line.key] === undefined && isOpen(line, draft.seen)

/** "The rest are yes" is open once every essential line is marked, and only for the others. */
export function mayRest(draft: Draft, lines: readonly Line[]): boolean {
  const isEssentialLeft = lines.some(line => line.essential && line.by === 'judge' && isOpen(line, draft.seen) && draft.marks[line.key] === undefined)
  return !isEssentialLeft && lines.some(line => isLeft(draft, line))
}

/** Says yes to every line that is left and not essential, and keeps that it was said so. */
export function withRest(draft: Draft, lines: readonly Line[]): Draft {
  if (!mayRest(draft, lines)) return draft
  const rest = lines.filter(line => isLeft(draft, line)).map(line => [line.key, { says: 'yes', rest: true }] satisfies [string, Given])
  return { ...draft, marks: { ...draft.marks, ...Object.fromEntries(rest) } }
}

/** What becomes of the piece; a piece that is not kept changes no level. */
export function withOutcome(draft: Draft, outcome: Outcome): Draft {
  return outcome === 'kept' ? { ...draft, outcome, remake: [] } : { ...draft, outcome, level: null, remake: outcome === 'mend' ? draft.remake : [] }
}

/** Points to a fault, with its because and do put into the words; pointed to again, it is taken back from both. */
export function withFault(draft: Draft, fault: { key: string, sees: string, because: string, do: string }): Draft {
  const says = `${fault.sees}: ${fault.because}. ${fault.do}`
  if (draft.faults.includes(fault.key)) {
    return { ...draft, faults: draft.faults.filter(key => key !== fault.key), words: draft.words.replace(says, '').replace(/\n{2,}/g, '\n').trim() }
  }
  return { ...draft, faults: [...draft.faults, fault.key], words: draft.words.trim() === '' ? says : `${draft.words.trim()}\n${says}` }
}

/** How many lines were looked at: marked, or measured by the maker and not asked for again. */
export function lookedAt(draft: Draft, lines: readonly Line[], again: string | null): { done: number, all: number } {
  const open = lines.filter(line => isOpen(line, draft.seen))
  const done = open.filter(line => draft.marks[line.key] !== undefined || (line.by !== 'judge' && line.takes.length > 0 && line.key !== again))
  return { done: done.length, all: open.length }
}

/** The piece with what is said of it so far; until it is said otherwise, as one that is kept and was seen at hold points. */
export function draftEvidence(draft: Draft, lines: readonly Line[], bare: Omit<PieceEvidence, 'outcome' | 'seen' | 'lines'>): PieceEvidence {
  return { ...bare, outcome: draft.outcome ?? 'kept', seen: draft.seen ?? 'holds', lines: evidenceLines(lines, draft.marks) }
}

export const draftGates = (draft: Draft, lines: readonly Line[], facts: Omit<GateFacts, 'piece'>, bare: Omit<PieceEvidence, 'outcome' | 'seen' | 'lines'>): Gate[] =>
  gates({ ...facts, piece: draftEvidence(draft, lines, bare) })

/** What is still missing before it can be judged, in the order of the page. */
export function stillMissing(draft: Draft, lines: readonly Line[], head: string, awaited: number, all: readonly Gate[]): MarkFault[] {
  const missing = missingMarks(lines, draft.marks, draft.seen ?? 'holds', draft.outcome ?? 'kept', head)
  if (awaited > 0 && !draft.inHand) missing.push({ key: 'photos', says: `${awaited} ${awaited === 1 ? 'photo is' : 'photos are'} still on the tablet. Wait, or say that you have the piece in the hand.` })
  if (draft.outcome === null) missing.push({ key: 'outcome', says: 'Say what becomes of this piece.' })
  if (draft.outcome !== null && draft.outcome !== 'kept' && draft.words.trim() === '') missing.push({ key: 'words', says: draft.outcome === 'mend' ? 'Say what is to be mended.' : 'Say why it is sent back.' })
  if (draft.outcome === 'mend' && draft.remake.length === 0) missing.push({ key: 'remake', says: 'Say from which step it is made again.' })
  if (draft.outcome !== null && draft.level === undefined) missing.push({ key: 'level', says: 'Say what holds from now on.' })
  const shut = all.find(gate => gate.level === draft.level && !gate.may)
  if (shut && missing.length === 0) missing.push({ key: 'level', says: `Level ${shut.level} is not open. ${shut.reasons[0]?.says ?? ''}` })
  if (draft.seen === null) missing.push({ key: 'seen', says: 'Say how much of the making you saw.' })
  return missing
}
