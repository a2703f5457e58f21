/** The bench's home as far as this tablet knows it, for when the studio is out of reach. */
import { fold, placeIndex } from '#shared/bench/machine'
import type { BenchHome } from '#shared/types/bench'
import { asEvents } from './append'
import { benchDb } from './db'

/** Pieces at the bench and lessons opened before, as they are kept here. */
export async function homeKept(person: string, name: string): Promise<BenchHome> {
  const db = await benchDb()
  const kept = await db.getAllFromIndex('pieces', 'person', person)
  const pieces: BenchHome['pieces'] = []
  for (const piece of kept) {
    const { state, set } = fold(piece.compiled, piece.id, asEvents(await db.getAllFromIndex('events', 'piece', piece.id)))
    if (state.status !== 'at-bench' || !set) continue
    pieces.push({ id: piece.id, label: piece.label, lesson: piece.revision.title, step: null, turnsDone: placeIndex(set, state), turnsAll: set.turns.length, photo: null, restsUntil: null, at: state.startedAt ?? '' })
  }
  const lessons = (await db.getAll('lessons')).filter(one => one.person === person).map(({ lesson }): BenchHome['lessons'][number] => ({
    id: lesson.lesson.id, slug: lesson.lesson.slug, title: lesson.revision.title, craft: lesson.compiled.craft, piece: lesson.compiled.piece, minutes: lesson.compiled.time.later, level: lesson.level,
    pieces: lesson.pieceNo - 1, lacks: lesson.needs.map(one => one.title), class: 'kept on this tablet', today: false,
  }))
  return { now: new Date().toISOString(), name, pieces: pieces.sort((a, b) => a.at < b.at ? 1 : -1), waiting: [], notes: [], lessons }
}

/** A moment in words: today by its time, else by its day. */
export function whenSays(iso: string, now: string): string {
  const at = new Date(iso)
  const isToday = at.toDateString() === new Date(now).toDateString()
  return at.toLocaleString('en-GB', isToday ? { hour: '2-digit', minute: '2-digit' } : { weekday: 'long', day: 'numeric', month: 'long', hour: '2-digit', minute: '2-digit' })
}
