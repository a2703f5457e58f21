import type { LapseState } from '../judging/lapse'
import type { PermissionState } from '../judging/permissions'
import type { Permission } from '../lesson/schema'
import type { PieceStatus, SignOffKind } from '../schemas/lists'

export interface LessonHeld { lesson: string, title: string, level: number, state: LapseState, until: string | null, oneSignature: boolean, signedOn: string | null, signedBy: string | null, isFounding: boolean, signOff: string | null }
export interface RecordAct { id: string, at: string, day: string, level: number | null, kind: SignOffKind | 'sent-back', by: string, byLevel: number, lesson: string, title: string, revision: number, says: string | null, piece: string | null }
export interface RecordPiece { id: string, label: string, lesson: string, title: string, status: PieceStatus, /** The day in the studio's zone. */ startedOn: string, finishedOn: string | null, turnsDone: number, turnsAll: number, practice: boolean, material: string }
/** A permission with the act it stands on. */
export interface RecordPermission { permission: Permission, state: PermissionState, by: string, on: string, limit: string | null, says: string | null }
export interface PersonRecord { person: { id: string, name: string, since: string }, today: string, permissions: RecordPermission[], held: LessonHeld[], acts: RecordAct[], pieces: RecordPiece[] }
