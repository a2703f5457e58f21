/** The demo studio, made through the same services as everything else, in time order with a moved clock. */
import { and, eq, lt } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { Lesson } from '../../../shared/lesson/schema'
import type { Db } from '../client'
import { inTransaction } from '../transaction'
import { people, personNames } from '../schema/people'
import { notes } from '../schema/pieces'
import { studios } from '../schema/studio'
import type { Actor } from '../../services/actor'
import { addLesson, makeClass } from '../../services/classes'
import type { Files } from '../../services/files'
import { importLesson } from '../../services/import'
import { readLesson } from '../../services/import-folder'
import { putIntoUse } from '../../services/into-use'
import { founding } from '../../services/names-under'
import { putInClass } from '../../services/class-people'
import { invite } from '../../services/invitations'
import { actOnRole, join } from '../../services/people'
import { found } from '../../services/refuse'
import { compiledLesson } from '../../services/compiled'
import { revisions } from '../schema/lessons'
import { judge, type JudgedPiece, putSecondName } from './judging'
import { makePiece } from './hands'
import { CLASSES, type DemoPerson, emailOf, FOUNDED, LESSON_ORDER, type LessonSlug, STAFF, STUDIO } from './people'
import { madePhotographs, type Subject } from './photographs'
import { demoPieces, type PlannedPiece } from './schedule'
import { seededDraws } from './draws'

const DAY = 86_400_000
const SUBJECTS: Record<LessonSlug, Subject> = { 'bench-safety': 'board', 'jump-rings': 'rings', 'wrapped-loop-link': 'link', 'coiled-bead-cap': 'cap', 'hand-knotted-strand': 'strand' }

export interface SeedOptions { now: Date, lessons: string, passwordHash: string, say?: (line: string) => void }
interface Taught { lessonId: string, revisionId: string, compiledSha: string, lesson: Lesson }
interface Demo { db: Db, files: Files, studioId: string, who: Map<string, Actor>, taught: Map<LessonSlug, Taught>, levels: Map<string, number> }

/** Makes the demo studio in an empty database. Takes about a minute. */
export async function seedDemo(db: Db, files: Files, { now, lessons, passwordHash, say = () => undefined }: SeedOptions): Promise<void> {
  const opened = new Date(now.getTime() - 330 * DAY)
  const demo = await openStudio(db, files, opened, passwordHash)
  say('People are in. Lessons come next.')
  await bringLessons(demo, lessons, new Date(opened.getTime() + DAY))
  await makeClasses(demo, now, new Date(opened.getTime() + 2 * DAY))
  const keeps = demo.taught.get('wrapped-loop-link')?.lesson.keeps ?? 183
  const planned = demoPieces(now, keeps)
  say(`${planned.length} pieces are made, judged and signed ...`)
  await work(demo, planned, now)
  // Notes are read at the next evening; only this week's are still to be read.
  await db.update(notes).set({ shownAt: now }).where(and(eq(notes.studioId, demo.studioId), lt(notes.at, new Date(now.getTime() - 6 * DAY))))
}

async function openStudio(db: Db, files: Files, at: Date, passwordHash: string): Promise<Demo> {
  const studioId = ulid(at.getTime())
  await db.insert(studios).values({ id: studioId, ...STUDIO, timeMade: at })
  const demo: Demo = { db, files, studioId, who: new Map(), taught: new Map(), levels: new Map() }
  const [owen, ...staff] = STAFF
  if (!owen) throw new Error('A studio begins with its manager.')
  await firstManager(demo, owen, at, passwordHash)
  const by = actor(demo, owen.key)
  for (const person of [...staff, ...CLASSES.flatMap(one => one.people)]) await addPerson(demo, by, person, at, passwordHash)
  return demo
}

const actor = (demo: Demo, key: string): Actor => found(demo.who.get(key))

async function firstManager(demo: Demo, person: DemoPerson, at: Date, passwordHash: string): Promise<void> {
  const id = ulid(at.getTime())
  await demo.db.insert(people).values({ id, email: emailOf(person.key), emailKey: emailOf(person.key), passwordHash, wants: {} })
  await demo.db.insert(personNames).values({ personId: id, version: 1, name: person.name, fromAt: at })
  const who: Actor = { studioId: demo.studioId, personId: id, roles: person.roles }
  demo.who.set(person.key, who)
  await inTransaction(demo.db, async (tx) => {
    await join(tx, who, id, 'adult', at)
    for (const role of person.roles) await actOnRole(tx, who, id, { id: ulid(at.getTime()), role, act: 'given' }, at)
  })
}

async function addPerson(demo: Demo, by: Actor, person: DemoPerson, at: Date, passwordHash: string): Promise<void> {
  const { id: personId } = await invite(demo.db, by, { id: ulid(at.getTime()), name: person.name, roles: person.roles, ageBand: person.ageBand ?? 'adult' }, at)
  await demo.db.update(people).set({ email: emailOf(person.key), emailKey: emailOf(person.key), passwordHash, hand: person.hand ?? 'right', textSize: person.textSize ?? 100, ground: person.ground ?? 'paper' }).where(eq(people.id, personId))
  demo.who.set(person.key, { studioId: demo.studioId, personId, roles: person.roles })
}

async function bringLessons(demo: Demo, folder: string, at: Date): Promise<void> {
  const ruth = actor(demo, 'ruth')
  for (const slug of LESSON_ORDER) {
    const imported = await importLesson(demo.db, ruth, await readLesson(`${folder}/${slug}`), at, demo.files)
    const { revision } = await putIntoUse(demo.db, ruth, slug, { id: ulid(at.getTime()), etag: imported.etag, effect: 'first', note: 'As it is taught here.' }, at)
    const [row] = await demo.db.select({ sha: revisions.compiledSha }).from(revisions).where(eq(revisions.id, revision.id))
    demo.taught.set(slug, { lessonId: imported.lessonId, revisionId: revision.id, compiledSha: found(row).sha, lesson: await compiledLesson(demo.db, demo.studioId, revision.id) })
  }
  for (const { key, lessons } of FOUNDED) {
    for (const [slug, level] of Object.entries(lessons)) {
      const taught = [...demo.taught].find(([one]) => one === slug)?.[1]
      if (!taught) continue
      demo.levels.set(`${key} ${slug}`, level)
      await founding(demo.db, actor(demo, 'owen'), { id: ulid(at.getTime()), person: actor(demo, key).personId, lesson: taught.lessonId, level }, at)
    }
  }
}

async function makeClasses(demo: Demo, now: Date, at: Date): Promise<void> {
  const owen = actor(demo, 'owen')
  const day = (moment: Date) => moment.toISOString().slice(0, 10)
  for (const one of CLASSES) {
    const made = await makeClass(demo.db, owen, { id: ulid(at.getTime()), name: one.name, weekday: one.weekday, termFrom: day(new Date(now.getTime() - 60 * DAY)), termTo: day(new Date(now.getTime() + 24 * DAY)) })
    for (const person of one.people) await putInClass(demo.db, owen, made.id, actor(demo, person.key).personId, at)
    for (const slug of LESSON_ORDER) await addLesson(demo.db, owen, made.id, { id: ulid(at.getTime()), lessonId: found(demo.taught.get(slug)).lessonId })
  }
}

/** Who judges: the class's own teacher where they hold 5, else Dilys, who does everywhere. */
function judgeOf(demo: Demo, piece: PlannedPiece): string {
  if (piece.judge) return piece.judge
  const teacher = CLASSES.find(one => one.people.some(person => person.key === piece.person.key))?.teacher ?? 'dilys'
  return FOUNDED.find(one => one.key === teacher)?.lessons[piece.lesson] === 5 ? teacher : 'dilys'
}

/** Who gives the second name: anyone else with 4 or more. */
function secondOf(lesson: LessonSlug, first: string): string {
  return FOUNDED.find(one => one.key !== first && (one.lessons[lesson] ?? 0) >= 4)?.key ?? first
}

async function work(demo: Demo, planned: PlannedPiece[], now: Date): Promise<void> {
  const draws = seededDraws(41)
  const bench = { db: demo.db, files: demo.files, photos: await madePhotographs(), random: draws }
  const seconds: { at: Date, signOff: string, by: string }[] = []
  const give = async (until: Date) => {
    for (const due of seconds.filter(one => one.at <= until)) {
      await putSecondName(demo.db, actor(demo, due.by), due.signOff, due.at)
      seconds.splice(seconds.indexOf(due), 1)
    }
  }
  for (const piece of planned) {
    await give(piece.at)
    const first = judgeOf(demo, piece)
    const judged = await makeAndJudge(demo, bench, piece, first)
    if (judged && piece.second) seconds.push({ at: new Date(judged.at.getTime() + 2 * DAY), signOff: judged.signOff, by: secondOf(piece.lesson, first) })
  }
  await give(now)
}

async function makeAndJudge(demo: Demo, bench: Parameters<typeof makePiece>[0], piece: PlannedPiece, first: string): Promise<JudgedPiece | null> {
  const taught = found(demo.taught.get(piece.lesson))
  const key = `${piece.person.key} ${piece.lesson}`
  const made = await makePiece(bench, {
    who: actor(demo, piece.person.key), lesson: taught.lesson, revision: { id: taught.revisionId, lessonId: taught.lessonId, compiledSha: taught.compiledSha }, at: piece.at, level: demo.levels.get(key) ?? 0,
    left: piece.person.hand === 'left', pace: piece.person.pace, practice: (demo.levels.get(key) ?? 0) < 3, witness: actor(demo, first), subject: SUBJECTS[piece.lesson], ...piece.until ? { until: piece.until } : {},
    ...piece.misses ? { misses: piece.misses } : {}, ...piece.off ? { off: piece.off } : {}, sizes: { ...smallSizes(taught.lesson), ...piece.sizes },
  })
  if (piece.outcome === 'waits' || piece.outcome === 'at-bench') return null
  const at = new Date(made.end.getTime() + 15 * 60_000)
  const judged = await judge(demo.db, actor(demo, first), made.id, { level: piece.level, outcome: piece.outcome, seen: piece.seen, words: piece.words ?? '', faults: piece.faults ?? [] }, at)
  if (piece.level !== null) demo.levels.set(key, Math.max(demo.levels.get(key) ?? 0, piece.level))
  return judged
}

/** Short strands and small sets: the demo shows the work, and need not count to two hundred. */
function smallSizes(lesson: Lesson): Record<string, number> {
  return Object.fromEntries(lesson.sizes.filter(size => size.unit === 'count' && typeof size.usual === 'number' && size.usual > 20 && size.from !== null).map(size => [size.name, Math.max(size.from ?? 1, 20)]))
}
