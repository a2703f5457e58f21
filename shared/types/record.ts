import type { LapseState } from '../judging/lapse'
import type { PieceStatus, SignOffKind } from '../schemas/lists'

export interface LessonHeld { lesson: string, title: string, level: number, state: LapseState, until: string | null, oneSignature: boolean, signedOn: string | null, signedBy: string | null, isFounding: boolean, signOff: string | null }
export interface RecordAct { id: string, at: string, day: string, level: number | null, kind: SignOffKind | 'sent-back', by: string, byLevel: number, lesson: string, title: string, revision: number, says: string | null, piece: string | null }
export interface RecordPiece { id: string, label: string, lesson: string, title: string, status: PieceStatus, startedAt: string, finishedOn: string | null, turnsDone: number, turnsAll: number, practice: boolean, material: string }
export interface PersonRecord { person: { id: string, name: string, since: string }, today: string, held: LessonHeld[], acts: RecordAct[], pieces: RecordPiece[] }
