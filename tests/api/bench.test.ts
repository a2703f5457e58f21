import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Db } from '#server/db/client'
import { lessons, classLessons } from '#server/db/schema/lessons'
import { notes } from '#server/db/schema/pieces'
import { classPeople } from '#server/db/schema/studio'
import type { BenchHome, BenchLesson, BenchRoom, LookLine } from '#shared/types/bench'
import { choices, hold, lesson, part, step } from '../unit/bench/bench-lesson'
import { type Caller, forgetAllTries, openStudio, openTest, type TestStudio } from './harness'
import { addLesson, finishedPiece, Tablet } from './judging-world'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
let other: TestStudio
let amy: Caller
let dev: Caller
let ruth: Caller
/** A lesson whose first step has a hold that must be witnessed below level 3. */
let held: { lessonId: string, revisionId: string }
const heldLesson = lesson([part('all', [step('cut', { title: [{ t: 'text', v: 'Cut it' }], holds: [hold([choices], { witness: 'below 3' })] }), step('file')])], { title: 'Held link', needs: ['wrapped-loop-link'], sizes: [] })

beforeAll(async () => {
  ({ db, close } = openTest())
  await forgetAllTries(db)
  studio = await openStudio(db)
  other = await openStudio(db)
  held = await addLesson({ ...studio.world }, studio.world.who.ruth, 'held-link', heldLesson, new Date(Date.now() - 86_400_000))
  ;[amy, dev, ruth] = [await studio.as('amy'), await studio.as('dev'), await studio.as('ruth')]
})
beforeEach(() => forgetAllTries(db))
afterAll(() => close())

// What the bench gets is typed where it is made; the tests read the same types.
const home = async (caller: Caller) => (await caller.get('/api/bench/home')).body as BenchHome
const before = async (caller: Caller, slug: string) => await caller.get(`/api/bench/lessons/${slug}`)
const room = async (caller: Caller) => (await caller.get('/api/bench/room')).body as BenchRoom
const line = async (caller: Caller, piece: string) => await caller.get(`/api/bench/line/${piece}`)

/** A piece of the held lesson at its hold, answered or not. */
async function atHold(maker: 'amy' | 'dev', isAnswered: boolean): Promise<Tablet> {
  const at = new Date()
  const tablet = new Tablet({ ...studio.world, ...held, lesson: heldLesson }, studio.world.who[maker])
  await tablet.send([tablet.begin(at, { sizes: {} }), ...isAnswered ? [tablet.event('hold.answered', { turn: 'cut', ask: 0, answer: { choice: 'right' } }, at)] : []], at)
  return tablet
}

describe('a person’s bench', () => {
  it('shows the lessons in use of their classes, and what comes first', async () => {
    const { lessons: shown, name } = await home(amy)
    expect(name).toBe('Amy Brandt')
    expect(shown.map(one => one.slug).sort()).toEqual(['held-link', 'wrapped-loop-link'])
    expect(shown.find(one => one.slug === 'held-link')?.lacks).toHaveLength(1)
  })
  it('shows a piece in hand with its step, then waiting once it is finished; nobody else’s', async () => {
    const tablet = await atHold('amy', false)
    expect((await home(amy)).pieces).toContainEqual(expect.objectContaining({ id: tablet.piece, step: 'Cut it', turnsDone: 0, turnsAll: 2 }))
    expect((await home(dev)).pieces.map(piece => piece.id)).not.toContain(tablet.piece)
    const done = await finishedPiece(studio.world, new Date(), { maker: studio.world.who.amy })
    expect((await home(amy)).waiting.map(piece => piece.id)).toContain(done)
  })
  it('shows no lesson that was put away or taken from the class', async () => {
    const away = await addLesson({ ...studio.world }, studio.world.who.ruth, 'put-away-one', heldLesson, new Date())
    expect((await home(amy)).lessons.map(one => one.slug)).toContain('put-away-one')
    await db.update(lessons).set({ putAwayAt: new Date() }).where(and(eq(lessons.studioId, studio.id), eq(lessons.id, away.lessonId)))
    expect((await home(amy)).lessons.map(one => one.slug)).not.toContain('put-away-one')
    expect((await before(amy, 'put-away-one')).status).toBe(404)
  })
})

describe('a lesson before a piece', () => {
  it('comes with its revision, level, number of the piece and what is lacking', async () => {
    const { status, body } = await before(amy, 'held-link')
    expect(status).toBe(200)
    const got = body as BenchLesson
    expect(got).toMatchObject({ lesson: { id: held.lessonId, slug: 'held-link' }, revision: { id: held.revisionId, number: 1, title: 'Held link' }, level: 0, needs: [{ slug: 'wrapped-loop-link' }], lacks: [] })
    expect(got.compiled).toEqual(JSON.parse(JSON.stringify(heldLesson)))
    expect(((await before(amy, held.lessonId)).body as BenchLesson).lesson.slug).toBe('held-link')
  })
  it('tells the sizes of the last piece and the pieces of today, for holds asked once', async () => {
    await finishedPiece(studio.world, new Date(), { maker: studio.world.who.dev })
    const got = (await before(dev, 'wrapped-loop-link')).body as BenchLesson
    expect(got.pieceNo).toBeGreaterThan(1)
    expect(got.last).not.toBeNull()
    expect(got.earlier.every(state => state.maker === studio.idOf('dev'))).toBe(true)
    expect(got.earlier.length).toBeGreaterThan(0)
  })
  it('is not there for who was never in a class with it, nor for another studio', async () => {
    const hidden = await addLesson({ ...studio.world }, studio.world.who.ruth, 'not-taught', heldLesson, new Date())
    await db.delete(classLessons).where(and(eq(classLessons.studioId, studio.id), eq(classLessons.lessonId, hidden.lessonId)))
    expect((await before(amy, 'not-taught')).status).toBe(404)
    expect((await before(ruth, 'not-taught')).status).toBe(200)
    expect((await before(await other.as('amy'), held.lessonId)).status).toBe(404)
  })
})

describe('the room', () => {
  it('shows a hold that waits for an instructor, until it is witnessed', async () => {
    const tablet = await atHold('dev', true)
    const row = async () => (await room(ruth)).rows.find(one => one.piece === tablet.piece)
    expect(await row()).toMatchObject({ maker: 'Dev Rana', step: 'Cut it', hold: { turn: 'cut', witness: true, misses: 0 } })
    expect((await ruth.post(`/api/pieces/${tablet.piece}/witness`, { id: ulid(), turn: 'cut', how: 'there' })).status).toBe(200)
    expect(await row()).toMatchObject({ hold: null })
  })
  it('shows a hold that is not answered as such, with its misses, and lets it go with a reason', async () => {
    const tablet = await atHold('amy', false)
    await tablet.send([tablet.event('hold.answered', { turn: 'cut', ask: 0, answer: { choice: 'wrong' } }, new Date())], new Date())
    const row = async () => (await room(ruth)).rows.find(one => one.piece === tablet.piece)
    expect(await row()).toMatchObject({ hold: { witness: false, misses: 1 } })
    expect((await ruth.post(`/api/pieces/${tablet.piece}/release`, { id: ulid(), turn: 'cut', says: '' })).status).toBe(400)
    expect((await ruth.post(`/api/pieces/${tablet.piece}/release`, { id: ulid(), turn: 'cut', says: 'The drawing is wrong.' })).status).toBe(200)
    expect(await row()).toMatchObject({ hold: null })
  })
  it('puts looks in the order they were asked for, and tells each its place in the line', async () => {
    const [first, second] = [await atHold('amy', false), await atHold('dev', false)]
    expect((await line(amy, first.piece)).body).toEqual({ asked: false, before: 0 } satisfies LookLine)
    for (const [i, tablet] of [first, second].entries()) {
      const at = new Date(Date.now() + i * 50)
      await tablet.send([tablet.event('look.asked', { turn: 'cut', about: 'stuck' }, at)], at)
    }
    expect((await line(dev, second.piece)).body).toEqual({ asked: true, before: 1 })
    expect((await room(ruth)).rows.filter(row => row.look).map(row => row.piece)).toEqual([first.piece, second.piece])
    expect((await ruth.post(`/api/pieces/${first.piece}/look`, { id: ulid(), says: 'Hold it lower.' })).status).toBe(200)
    expect((await line(dev, second.piece)).body).toEqual({ asked: true, before: 0 })
    expect((await line(await other.as('amy'), second.piece)).status).toBe(404)
  })
  it('is not for apprentices, and shows an instructor of a class only that class', async () => {
    expect((await amy.get('/api/bench/room')).status).toBe(403)
    expect((await room(await other.as('ruth'))).rows).toEqual([])
    await db.insert(classPeople).values({ studioId: studio.id, classId: studio.world.classId, personId: studio.idOf('dilys'), fromOn: '2026-01-01' })
    expect((await room(await studio.as('dilys'))).rows.length).toBeGreaterThan(0)
  })
})

describe('notes', () => {
  it('wait on the bench until they are read, and are read by nobody else', async () => {
    const { notes: shown } = await home(amy)
    const note = shown.find(one => one.says === 'Hold it lower.')
    expect(note).toMatchObject({ by: 'Ruth Calder', danger: false })
    expect((await dev.post(`/api/bench/notes/${note?.id}/read`)).status).toBe(404)
    expect((await amy.post(`/api/bench/notes/${note?.id}/read`)).status).toBe(200)
    const [row] = await db.select({ shownAt: notes.shownAt }).from(notes).where(and(eq(notes.studioId, studio.id), eq(notes.id, note?.id ?? '')))
    expect((await amy.post(`/api/bench/notes/${note?.id}/read`)).status).toBe(200)
    const [again] = await db.select({ shownAt: notes.shownAt }).from(notes).where(and(eq(notes.studioId, studio.id), eq(notes.id, note?.id ?? '')))
    expect(again?.shownAt).toEqual(row?.shownAt)
    expect((await home(amy)).notes.map(one => one.id)).not.toContain(note?.id)
  })
})
