/** What the pages about lessons are given. Times are ISO texts. */
import type { Craft, Finding, Lesson } from '../lesson/schema'
import type { Drawn } from '../trade/drawing'
import type { Effect, REVISION_ACTS } from '../schemas/lists'

export const LESSON_STAGES = ['in-use', 'draft', 'withdrawn', 'put-away'] as const
export type LessonStage = (typeof LESSON_STAGES)[number]

export interface LessonRow {
  id: string
  slug: string
  craft: Craft
  title: string
  /** Slugs of the lessons to hold first. */
  needs: string[]
  /** Minutes. */
  time: { maker: number, first: number, later: number } | null
  stage: LessonStage
  /** The one in use, else the last. */
  revision: { number: number, at: string } | null
  author: string
  /** Drawn from its own figures at its usual sizes. */
  drawing: Drawn | null
  /** A text that is ahead of what is in use. */
  draft: { savedAt: string } | null
}

export interface RevisionRow {
  id: string
  number: number
  title: string
  at: string
  by: string
  effect: Effect
  note: string
  acts: { act: (typeof REVISION_ACTS)[number], by: string, at: string }[]
}

export interface LessonView {
  lesson: { id: string, slug: string, craft: Craft, stage: LessonStage, title: string }
  /** The revision shown with its compiled value: the one in use, else the last, else none. */
  shown: { revision: RevisionRow, compiled: Lesson } | null
  currentRevision: string | null
  revisions: RevisionRow[]
  draft: { savedAt: string, by: string, ahead: boolean }
}

export interface DraftPicture {
  name: string
  sha: string
  width: number
  height: number
  bytes: number
}

export interface DraftView {
  /** Who reads: texts kept on a device are kept apart by person. */
  reader: string
  lesson: { id: string, slug: string, stage: LessonStage }
  source: string
  etag: string
  savedAt: string
  by: string
  /** The revision the text was written on. */
  base: { number: number } | null
  pictures: DraftPicture[]
  /** What the compiler needs to know of the studio. */
  slugs: string[]
  previous: Lesson | null
}

/** What a draft would be if it were put into use now. */
export interface UseView {
  lesson: { id: string, slug: string, title: string }
  etag: string
  number: number
  findings: Finding[]
  keys: { key: string, title: string }[]
  effect: Effect
  says: string[]
  /** The revision that already has this very text and these pictures. */
  same: { id: string, number: number, inUse: boolean } | null
}
