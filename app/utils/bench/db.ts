/** What a tablet keeps: pieces with their lessons, events sent and unsent, photos, and lessons to begin with. */
import { type DBSchema, type IDBPDatabase, openDB } from 'idb'
import type { BenchEvent } from '#shared/bench/events'
import type { BenchLesson, PieceTakenUp } from '#shared/types/bench'

export interface KeptPiece {
  id: string
  /** Whose it is; nothing of another person is shown or sent. */
  person: string
  revision: PieceTakenUp['revision']
  compiled: PieceTakenUp['compiled']
  /** What is written on the bag; empty until the studio has numbered it. */
  label: string
  /** Number of the last event pulled from the studio. */
  pulled: number
}
export interface KeptEvent {
  id: string
  piece: string
  tablet: string
  seq: number
  actor: string
  event: BenchEvent
  /** Its number at the studio; null while it is only here. */
  n: number | null
  late: boolean
  /** Why the studio set it aside. */
  aside: { reason: string, says: string } | null
}
export interface KeptPhoto { id: string, piece: string, person: string, blob: Blob, sent: 'no' | 'yes' | 'aside', says: string }
export interface KeptLesson { key: string, person: string, lesson: BenchLesson, at: string }

export interface BenchDbSchema extends DBSchema {
  pieces: { key: string, value: KeptPiece, indexes: { person: string } }
  events: { key: string, value: KeptEvent, indexes: { piece: string, actor: string } }
  photos: { key: string, value: KeptPhoto, indexes: { piece: string, person: string } }
  lessons: { key: string, value: KeptLesson }
  facts: { key: string, value: string }
}
export type BenchDb = IDBPDatabase<BenchDbSchema>

let opened: Promise<BenchDb> | null = null

/** The one connection of this page. */
export function benchDb(name = 'thirdhand-bench'): Promise<BenchDb> {
  opened ??= openBenchDb(name).catch((error: unknown) => {
    opened = null
    throw error
  })
  return opened
}

export function openBenchDb(name: string): Promise<BenchDb> {
  return openDB<BenchDbSchema>(name, 1, {
    upgrade(db) {
      db.createObjectStore('pieces', { keyPath: 'id' }).createIndex('person', 'person')
      const events = db.createObjectStore('events', { keyPath: 'id' })
      events.createIndex('piece', 'piece')
      events.createIndex('actor', 'actor')
      const photos = db.createObjectStore('photos', { keyPath: 'id' })
      photos.createIndex('piece', 'piece')
      photos.createIndex('person', 'person')
      db.createObjectStore('lessons', { keyPath: 'key' })
      db.createObjectStore('facts')
    },
    blocking: (_current, _blocked, event) => {
      // A newer page wants to change the shape: give way, and open again when it is needed.
      if (event.target instanceof IDBDatabase) event.target.close()
      opened = null
    },
    terminated: () => { opened = null },
  })
}

/** The id of this tablet, made once. */
export async function tabletId(db: BenchDb, make: () => string): Promise<string> {
  const tx = db.transaction('facts', 'readwrite')
  const known = await tx.store.get('tablet')
  const id = known ?? make()
  if (!known) await tx.store.put(id, 'tablet')
  await tx.done
  return id
}
