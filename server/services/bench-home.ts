import { and, asc, desc, eq, gte, inArray, isNotNull, isNull, lte, or } from 'drizzle-orm'
import type { State } from '../../shared/bench/state'
import { lapse } from '../../shared/judging/lapse'
import { NOTHING_HELD } from '../../shared/judging/signer'
import type { Lesson } from '../../shared/lesson/schema'
import type { BenchHome, HomeLesson, HomeNote, HomePiece, HomeWaiting } from '../../shared/types/bench'
import type { Db, DbOrTx } from '../db/client'
import { standings } from '../db/schema/judging'
import { classLessons, lessons, revisions } from '../db/schema/lessons'
import { notes, photos, pieces, words } from '../db/schema/pieces'
import { classes, classPeople } from '../db/schema/studio'
import type { Actor } from './actor'
import { inHand } from './bench-words'
import { compiledLesson } from './compiled'
import { heldBy, todayOf } from './judging-facts'
import { isState } from './ledger'
import { restsUntil } from './looks'
import { currentNames, nameIn } from './names'
import { found } from './refuse'

/** What a person's bench shows: pieces in hand, what waits or rests, notes, and the lessons of their classes. */
export async function benchHome(db: Db, who: Actor, now: Date): Promise<BenchHome> {
  const names = await currentNames(db, [who.personId])
  const own = await ownPieces(db, who)
  return {
    now: now.toISOString(), name: nameIn(names, who.personId), pieces: await piecesInHand(db, who, own.filter(row => row.status === 'at-bench'), now),
    waiting: own.filter(row => row.status === 'finished').map((row): HomeWaiting => ({
      id: row.id, label: row.label, lesson: row.title, since: (row.waitingSince ?? row.startedAt).toISOString(), restsUntil: restsUntil(row.state, now),
    })),
    notes: await unseenNotes(db, who), lessons: await lessonsOf(db, who, now),
  }
}

const ofRevision = and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId))

async function ownPieces(db: DbOrTx, who: Actor) {
  return await db.select({
    id: pieces.id, label: pieces.label, status: pieces.status, revisionId: pieces.revisionId, title: revisions.title, turnsDone: pieces.turnsDone, turnsAll: pieces.turnsAll, state: pieces.state,
    startedAt: pieces.startedAt, waitingSince: pieces.waitingSince,
  }).from(pieces).innerJoin(revisions, ofRevision)
    .where(and(eq(pieces.studioId, who.studioId), eq(pieces.personId, who.personId), inArray(pieces.status, ['at-bench', 'finished']))).orderBy(desc(pieces.startedAt), desc(pieces.id))
}
type OwnPiece = Awaited<ReturnType<typeof ownPieces>>[number]

async function piecesInHand(db: DbOrTx, who: Actor, rows: readonly OwnPiece[], now: Date): Promise<HomePiece[]> {
  const held = rows.length === 0 ? [] : await db.select({ id: photos.id, pieceId: photos.pieceId }).from(photos)
    .where(and(eq(photos.studioId, who.studioId), inArray(photos.pieceId, rows.map(row => row.id)), eq(photos.state, 'held'))).orderBy(asc(photos.id))
  const newest = new Map(held.map(photo => [photo.pieceId, photo.id]))
  const shown: HomePiece[] = []
  for (const row of rows) {
    const step = isState(row.state) ? inHand(await compiledLesson(db, who.studioId, row.revisionId), row.state).step : null
    shown.push({
      id: row.id, label: row.label, lesson: row.title, step, turnsDone: row.turnsDone, turnsAll: row.turnsAll, photo: newest.get(row.id) ?? null,
      restsUntil: isState(row.state) ? restsStill(row.state, now) : null, at: row.startedAt.toISOString(),
    })
  }
  return shown
}

/** When the wait in hand is over; one that was gone on from rests no more. */
function restsStill(state: State, now: Date): string | null {
  const waits = Object.fromEntries(Object.entries(state.waits).filter(([key]) => state.done[key.split('#')[0] ?? ''] === undefined))
  return restsUntil({ ...state, waits }, now)
}

async function unseenNotes(db: DbOrTx, who: Actor): Promise<HomeNote[]> {
  const rows = await db.select({ id: notes.id, text: words.text, erasedAt: words.erasedAt, by: words.by, danger: notes.danger, at: notes.at, label: pieces.label }).from(notes)
    .innerJoin(words, and(eq(words.studioId, notes.studioId), eq(words.id, notes.wordsId)))
    .leftJoin(pieces, and(eq(pieces.studioId, notes.studioId), eq(pieces.id, notes.pieceId)))
    .where(and(eq(notes.studioId, who.studioId), eq(notes.personId, who.personId), isNull(notes.shownAt))).orderBy(asc(notes.at), asc(notes.id))
  const names = await currentNames(db, rows.map(row => row.by))
  return rows.flatMap(row => row.erasedAt ? [] : [{ id: row.id, says: row.text, by: nameIn(names, row.by), label: row.label, danger: row.danger, at: row.at.toISOString() }])
}

/** A note was read. Again is the same; another's is 404. */
export async function noteRead(db: Db, who: Actor, id: string, now: Date): Promise<void> {
  const own = and(eq(notes.studioId, who.studioId), eq(notes.id, id), eq(notes.personId, who.personId))
  found((await db.select({ id: notes.id }).from(notes).where(own))[0])
  await db.update(notes).set({ shownAt: now }).where(and(own, isNull(notes.shownAt)))
}

/** Lessons in use of the classes a person is in today, each once; those of a class that meets today first. */
async function lessonsOf(db: DbOrTx, who: Actor, now: Date): Promise<HomeLesson[]> {
  const { settings, today } = await todayOf(db, who.studioId, now)
  const rows = await db.select({ id: lessons.id, slug: lessons.slug, craft: lessons.craft, revisionId: revisions.id, title: revisions.title, class: classes.name, weekday: classes.weekday }).from(classLessons)
    .innerJoin(classes, and(eq(classes.studioId, classLessons.studioId), eq(classes.id, classLessons.classId)))
    .innerJoin(classPeople, and(eq(classPeople.studioId, classes.studioId), eq(classPeople.classId, classes.id)))
    .innerJoin(lessons, and(eq(lessons.studioId, classLessons.studioId), eq(lessons.id, classLessons.lessonId)))
    .innerJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .where(and(eq(classLessons.studioId, who.studioId), eq(classPeople.personId, who.personId), lte(classPeople.fromOn, today), or(isNull(classPeople.untilOn), gte(classPeople.untilOn, today)),
      isNull(lessons.putAwayAt), isNotNull(lessons.currentRevision)))
    .orderBy(asc(classLessons.place), asc(lessons.slug))
  const weekday = weekdayOf(today)
  const inOrder = [...rows.filter(row => row.weekday === weekday), ...rows.filter(row => row.weekday !== weekday)]
  const held = await heldBy(db, who.studioId, who.personId)
  const made = new Map((await db.select({ lessonId: standings.lessonId, pieces: standings.pieces }).from(standings)
    .where(and(eq(standings.studioId, who.studioId), eq(standings.personId, who.personId)))).map(row => [row.lessonId, row.pieces]))
  const levelOf = (id: string) => lapse(held.get(id) ?? NOTHING_HELD, settings, today).level
  const titles = await titlesBySlug(db, who.studioId)
  const shown = new Map<string, HomeLesson>()
  for (const row of inOrder) {
    if (shown.has(row.id)) continue
    const compiled = await compiledLesson(db, who.studioId, row.revisionId)
    const lacks = compiled.needs.flatMap((slug) => { const needed = titles.get(slug); return needed && levelOf(needed.id) < settings.neededLevel ? [needed.title] : [] })
    shown.set(row.id, { id: row.id, slug: row.slug, title: row.title, craft: row.craft, piece: compiled.piece, minutes: minutesOf(compiled, levelOf(row.id)), level: levelOf(row.id), pieces: made.get(row.id) ?? 0, lacks, class: row.class, today: row.weekday === weekday })
  }
  return [...shown.values()]
}

const minutesOf = (lesson: Lesson, level: number): number => level >= 2 ? lesson.time.later : lesson.time.first
/** 1 Monday to 7 Sunday (ISO 8601) of a day `2026-03-01`. */
const weekdayOf = (day: string): number => new Date(`${day}T12:00:00Z`).getUTCDay() || 7

/** Lessons of the studio by slug; one that is not in use goes by its slug. */
export async function titlesBySlug(db: DbOrTx, studioId: string): Promise<Map<string, { id: string, title: string }>> {
  const rows = await db.select({ id: lessons.id, slug: lessons.slug, title: revisions.title }).from(lessons)
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision))).where(eq(lessons.studioId, studioId))
  return new Map(rows.map(row => [row.slug, { id: row.id, title: row.title ?? row.slug }]))
}
