/** What the judging pages get from the server. Dates are ISO text; days are `2026-03-01`. */
import type { Permission } from '../lesson/schema'
import type { Gate, GateFacts, HeldPermission } from '../judging/gates'
import type { PieceEvidence } from '../judging/evidence'
import type { Line } from '../judging/marks'
import type { MaySign, Reason } from '../judging/signer'
import type { Outcome, PermissionAct, Seen, SignOffKind } from '../schemas/lists'

export interface LookRow {
  piece: string
  label: string
  maker: string
  makerId: string
  lesson: string
  /** Waiting since, or resting until. */
  at: string
  mayYou: MaySign
  /** A held photo to know the bag by. */
  photo: string | null
}
export interface AskedRow extends Omit<LookRow, 'mayYou' | 'photo'> { look: string, about: string, turn: string | null }
export interface Looks { now: string, asked: AskedRow[], waiting: LookRow[], resting: LookRow[], toSign: number, secondNames: number }

export interface PhotoView { id: string, turn: string | null, title: string, for: string, state: 'awaited' | 'held' | 'erased', at: string, hasScale: boolean | null }
export interface HistoryRow { piece: string, label: string, day: string, outcome: Outcome, seen: Seen, by: string, level: number | null, misses: number }
export interface TurnTitle { address: string, title: string }
export interface FaultChoice { key: string, sees: string, because: string, do: string }
export interface MissRow { title: string, count: number, released: boolean }

export interface PieceView {
  id: string
  label: string
  lesson: string
  lessonId: string
  revision: number
  revisionId: string
  material: string
  practice: boolean
  goods: boolean
  left: boolean
  /** The object itself comes out mirrored when made left-handed. */
  mayMirror: boolean
  setOf: string
  n: number
  head: string
  waitingSince: string | null
  finishedOn: string | null
  minutes: number
  rounds: number
}
export interface JudgedAlready { id: string, by: string, at: string, outcome: Outcome, level: number | null, signedBy: string | null }

export interface LookView {
  now: string
  piece: PieceView
  maker: { id: string, name: string }
  isOpen: boolean
  judged: JudgedAlready | null
  mayYou: MaySign
  lines: Line[]
  again: string | null
  facts: Omit<GateFacts, 'piece'>
  bare: Omit<PieceEvidence, 'outcome' | 'seen' | 'lines'>
  photos: PhotoView[]
  awaited: number
  misses: MissRow[]
  early: string[]
  faultsSeen: string[]
  own: Record<string, string>
  history: HistoryRow[]
  faults: FaultChoice[]
  turns: TurnTitle[]
  /** Acts that came after the piece was finished, or that were set aside. */
  late: number
  setAside: number
  /** Judged by this person and not signed, this piece left out. */
  toSign: number
}

export interface ToSign {
  judgement: string
  judgements: string[]
  piece: string
  label: string
  maker: string
  lesson: string
  level: number
  judgedAt: string
  gate: Gate
  /** Came in since it was judged. */
  came: number
  n: number
  head: string
}
export interface SecondNameRow { signOff: string, maker: string, lesson: string, level: number, by: string, at: string, pieces: { id: string, label: string }[], reasons: Reason[] }
export interface WaitingToSign { items: ToSign[], secondNames: SecondNameRow[] }

export interface Signed { id: string, ok: true, level: number, needsSecondName: boolean }
export interface NotSigned { id: string, ok: false, statusCode: number, says: string, reasons: Reason[] }
export type SignResult = Signed | NotSigned

export interface NameUnder { id: string, kind: SignOffKind, name: string, level: number, byLevel: number, at: string }
export interface SignOffPiece { id: string, label: string, judgement: string, day: string, seen: Seen, n: number, joinedAfter: number }
export interface SignOffView {
  id: string
  person: string
  name: string
  lesson: string
  lessonId: string
  revision: number
  level: number
  kind: SignOffKind
  of: string
  at: string
  day: string
  isInForce: boolean
  oneSignature: boolean
  isSelf: boolean
  names: NameUnder[]
  pieces: SignOffPiece[]
  /** Things that came in after the judge looked: shown, of no effect. */
  joinedAfter: number
  digest: string
  /** The digest, taken again from the record, is the one that was signed. */
  isWhole: boolean
  words: string | null
}

export interface PermissionActView { id: string, permission: Permission, act: PermissionAct, limit: string | null, by: string, at: string, words: string | null }
export interface PermissionsView { held: HeldPermission[], acts: PermissionActView[] }

/** Where a founding level may be given, and to whom. */
export interface FoundingView { lessons: { id: string, title: string }[], instructors: { id: string, name: string }[] }
