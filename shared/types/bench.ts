/** What the bench pages get from the server. Moments are ISO text. */
import type { PieceStarted, StoredEvent } from '../bench/events'
import type { State } from '../bench/state'
import type { Craft, Lesson, Permission } from '../lesson/schema'
import type { PieceStatus } from '../schemas/lists'

export interface HomePiece {
  id: string
  label: string
  lesson: string
  /** The step in hand as it reads with this piece's figures; null when only the closing list is left. */
  step: string | null
  turnsDone: number
  turnsAll: number
  /** Newest photo the studio holds. */
  photo: string | null
  /** A wait of the piece ends then. */
  restsUntil: string | null
  at: string
}
export interface HomeWaiting { id: string, label: string, lesson: string, since: string, restsUntil: string | null }
export interface HomeNote { id: string, says: string, by: string, label: string | null, danger: boolean, at: string }
export interface HomeLesson {
  id: string
  slug: string
  title: string
  craft: Craft
  piece: string
  /** Minutes, the first time or later. */
  minutes: number
  level: number
  pieces: number
  /** Lessons to hold first that are not held, by title. */
  lacks: string[]
  class: string
  /** The class meets today. */
  today: boolean
}
export interface BenchHome { now: string, name: string, pieces: HomePiece[], waiting: HomeWaiting[], notes: HomeNote[], lessons: HomeLesson[] }

export interface BenchLesson {
  lesson: { id: string, slug: string }
  revision: { id: string, number: number, compiledSha: string, engine: number, title: string }
  compiled: Lesson
  /** As it stands today. */
  level: number
  /** The number of the piece that would begin now, from 1. */
  pieceNo: number
  pictures: { name: string, alt: string, mirror: boolean }[]
  /** Permissions a step or the lesson asks for and the person has not. */
  lacks: Permission[]
  /** Lessons to hold first that are not held at the level asked. */
  needs: { slug: string, title: string }[]
  last: PieceStarted['sizes'] | null
  /** Pieces of today, for holds asked once. */
  earlier: State[]
}

export interface RoomRow {
  piece: string
  label: string
  maker: string
  makerId: string
  lesson: string
  step: string | null
  turnsDone: number
  turnsAll: number
  /** When something was last heard of it. */
  at: string
  look: { id: string, about: string, at: string } | null
  /** A hold in hand: what cannot be undone, whether only who looks is missing, and how often it was missed. */
  hold: { turn: string, consequence: string, witness: boolean, misses: number } | null
  stopped: boolean
}
export interface BenchRoom { now: string, rows: RoomRow[] }

/** Where in the line a look that was asked for stands: how many were asked before it. */
export interface LookLine { asked: boolean, before: number }

/** `GET /api/pieces/:piece` as the player takes it up. */
export interface PieceTakenUp {
  piece: { id: string, personId: string, lessonId: string, revisionId: string, label: string, status: PieceStatus }
  revision: { id: string, number: number, title: string, compiledSha: string, engine: number }
  compiled: Lesson
  events: StoredEvent[]
  n: number
  head: string
}
