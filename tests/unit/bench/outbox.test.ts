import 'fake-indexeddb/auto'
import { Blob } from 'node:buffer'
import { beforeEach, describe, expect, it } from 'vitest'
import type { BenchEvent, Bodies, MakerKind, StoredEvent } from '../../../shared/bench/events'
import { fold } from '../../../shared/bench/machine'
import type { Lesson } from '../../../shared/lesson/schema'
import { append, asEvents } from '../../../app/utils/bench/append'
import { type BenchDb, type KeptPhoto, type KeptPiece, openBenchDb, tabletId } from '../../../app/utils/bench/db'
import { pull, sendAll, takeIn, type ToStudio } from '../../../app/utils/bench/send'
import { choices, hold, id, lesson, part, start, step } from './bench-lesson'

const of: Lesson = lesson([part('all', [step('cut', { holds: [hold([choices])] }), step('file'), step('burnish')])])
const clock = () => '2026-01-05T18:00:00.000Z'
let db: BenchDb
let kept: KeptPiece
let tablet: string
const person = id()

const act = <K extends MakerKind>(kind: K, body: Bodies[K], own = id(), photo?: KeptPhoto) => append(db, kept, { id: own, kind, body }, { tablet, actor: person, at: clock(), since: null }, photo)
const events = () => db.getAllFromIndex('events', 'piece', kept.id)
const stateNow = async () => fold(of, kept.id, asEvents(await events())).state
const begin = () => act('piece.started', start(of))
const workThrough = async () => {
  await act('hold.answered', { turn: 'cut', ask: 0, answer: { choice: 'right' } })
  for (const turn of ['cut', 'file', 'burnish']) await act('step.done', { turn, early: false })
}

/** A studio that takes events in the order of seq, and whose answers can be lost or changed. */
class Studio implements ToStudio {
  stored: StoredEvent[] = []
  photos: string[] = []
  calls: string[] = []
  late = false
  answer: (events: BenchEvent[]) => number | null = () => null
  refuses: (event: BenchEvent) => boolean = () => false
  private readonly used = new Map<string, number>()

  forget(from: number): void {
    this.stored = this.stored.filter(event => event.seq < from)
    this.used.set(tablet, from - 1)
  }

  async post(_: string, body: unknown) {
    const { events: sent } = body as { events: BenchEvent[] }
    this.calls.push(`${sent.length}`)
    const status = this.answer(sent)
    if (status === 0) throw new Error('out of reach')
    if (status !== null) return { status, data: { message: 'no' } }
    const out = { n: 0, taken: [] as { id: string, n: number, late: boolean }[], already: [] as { id: string, n: number }[], refused: null as null | { id: string, reason: string, says: string, expected?: number } }
    for (const event of sent) {
      const known = this.stored.find(one => one.id === event.id)
      if (known) { out.already.push({ id: event.id, n: known.n }); continue }
      const next = (this.used.get(event.tablet) ?? 0) + 1
      if (event.seq !== next) { out.refused = { id: event.id, reason: 'seq', says: 'Acts before this one have not arrived.', expected: next }; break }
      this.used.set(event.tablet, event.seq)
      if (this.refuses(event)) { out.refused = { id: event.id, reason: 'not-there-yet', says: 'Steps before this one are still to be done.' }; break }
      this.stored.push({ ...event, n: this.stored.length + 1, late: this.late })
      out.taken.push({ id: event.id, n: this.stored.length, late: this.late })
    }
    return { status: out.refused ? 422 : 200, data: out }
  }

  async put(address: string) {
    this.photos.push(address)
    return { status: 200, data: { state: 'held' } }
  }

  async get(address: string) {
    const after = Number(address.split('after=')[1])
    return { status: 200, data: { events: this.stored.filter(event => event.n > after), n: this.stored.length } }
  }
}
let studio: Studio
const send = () => sendAll(db, studio, tablet, person, clock)
const photo = (own: string): KeptPhoto => ({ id: own, piece: kept.id, person, blob: new Blob(['x']) as unknown as globalThis.Blob, sent: 'no', says: '' })
const photoBody = (own: string): Bodies['photo.taken'] => ({ photo: own, turn: null, for: 'finished', sha256: 'a'.repeat(64), bytes: 1, type: 'image/jpeg', width: 1, height: 1 })

beforeEach(async () => {
  db = await openBenchDb(`bench-${id()}`)
  tablet = await tabletId(db, id)
  kept = { id: id(), person, revision: { id: id(), number: 1, title: of.title, compiledSha: 'a'.repeat(64), engine: 1 }, compiled: of, label: '', pulled: 0 }
  studio = new Studio()
})

describe('what is kept', () => {
  it('is numbered without a gap, whatever was refused between', async () => {
    await begin()
    expect(await act('step.done', { turn: 'burnish', early: false })).toMatchObject({ ok: false, says: 'Steps before this one are still to be done.' })
    expect(await act('piece.finished', {})).toMatchObject({ ok: false })
    await workThrough()
    expect((await events()).map(one => one.seq).sort((a, b) => a - b)).toEqual([1, 2, 3, 4, 5])
  })
  it('does not pass a hold by going on', async () => {
    await begin()
    expect(await act('step.done', { turn: 'cut', early: false })).toMatchObject({ ok: false, says: 'The hold point before this step is not answered yet.' })
  })
  it('takes the same act of two pages once, and different ones in turn', async () => {
    await begin()
    const same = id()
    const answer: Bodies['hold.answered'] = { turn: 'cut', ask: 0, answer: { choice: 'wrong' } }
    await Promise.all([act('hold.answered', answer, same), act('hold.answered', answer, same), act('hold.answered', answer)])
    expect((await stateNow()).misses.cut).toBe(2)
    expect(new Set((await events()).map(one => one.seq)).size).toBe(3)
  })
  it('keeps a photo with its event, or neither', async () => {
    await begin()
    const own = id()
    expect(await act('photo.taken', { ...photoBody(own), turn: 'burnish' }, id(), photo(own))).toMatchObject({ ok: false })
    expect(await db.get('photos', own)).toBeUndefined()
    await act('photo.taken', photoBody(own), id(), photo(own))
    expect(await db.get('photos', own)).toMatchObject({ sent: 'no' })
  })
  it('takes nothing after the piece was put away, or while it is stopped', async () => {
    await begin()
    await send()
    const { state } = fold(of, kept.id, asEvents(await events()))
    await takeIn(db, kept.id, [{ id: id(), piece: kept.id, round: state.round, tablet: id(), seq: 1, actor: id(), kind: 'stop.called', v: 1, at: clock(), since: null, body: { why: 'danger', words: null }, n: 2, late: false }])
    expect(await act('hold.answered', { turn: 'cut', ask: 0, answer: { choice: 'right' } })).toMatchObject({ ok: false, says: 'This piece is stopped. Ask an instructor.' })
    expect(await act('piece.put-away', { why: 'stopped', words: null })).toMatchObject({ ok: true })
    expect(await act('look.asked', { turn: null, about: 'stuck' })).toMatchObject({ ok: false, says: 'This piece was put away.' })
  })
})

describe('sending', () => {
  it('sends all in order, and the photo after its event', async () => {
    await begin()
    await workThrough()
    const own = id()
    await act('photo.taken', photoBody(own), id(), photo(own))
    expect(await send()).toBe('sent')
    expect(studio.stored.map(event => event.seq)).toEqual([1, 2, 3, 4, 5, 6])
    expect(studio.photos).toEqual([`/api/photos/${own}`])
    expect((await events()).every(one => one.n !== null)).toBe(true)
    studio.calls = []
    expect(await send()).toBe('sent')
    expect(studio.calls).toEqual([])
  })
  it('keeps everything while the studio is out of reach, and loses and doubles nothing when an answer is lost', async () => {
    await begin()
    await workThrough()
    studio.answer = () => 0
    expect(await send()).toBe('away')
    studio.answer = () => null
    const heard = studio.post.bind(studio)
    studio.post = async (address, body) => { await heard(address, body); throw new Error('the answer was lost') }
    expect(await send()).toBe('away')
    expect((await events()).every(one => one.n === null)).toBe(true)
    studio.post = heard
    expect(await send()).toBe('sent')
    expect(studio.stored).toHaveLength(5)
  })
  it('asks who it is, and sends nothing else, on 401', async () => {
    await begin()
    studio.answer = () => 401
    expect(await send()).toBe('who')
    expect((await events())[0]).toMatchObject({ n: null, aside: null })
  })
  it('sets one refused act aside with its sentence and goes on with the next', async () => {
    await begin()
    await workThrough()
    studio.refuses = event => event.kind === 'step.done' && event.body.turn === 'cut'
    expect(await send()).toBe('sent')
    const aside = (await events()).filter(one => one.aside)
    expect(aside.map(one => one.aside)).toEqual([{ reason: 'not-there-yet', says: 'Steps before this one are still to be done.' }])
    expect(studio.stored).toHaveLength(4)
    expect((await stateNow()).done).not.toHaveProperty('cut')
  })
  it('sends again what a studio lost that was put back from a copy', async () => {
    await begin()
    await act('hold.answered', { turn: 'cut', ask: 0, answer: { choice: 'right' } })
    await send()
    studio.forget(2)
    await act('step.done', { turn: 'cut', early: false })
    expect(await send()).toBe('sent')
    expect(studio.stored.map(event => event.seq)).toEqual([1, 2, 3])
    expect((await events()).some(one => one.aside)).toBe(false)
  })
  it('sends a hundred at a time', async () => {
    await begin()
    for (let i = 0; i < 120; i++) await act('fault.seen', { turn: 'cut', fault: 'tight' })
    expect(await send()).toBe('sent')
    expect(studio.calls).toEqual(['100', '21'])
  })
  it('sends nothing of another person', async () => {
    await begin()
    expect(await sendAll(db, studio, tablet, id(), clock)).toBe('sent')
    expect(studio.calls).toEqual([])
  })
})

describe('another tablet', () => {
  it('decided first: what comes late is told at once, with what decided it', async () => {
    await begin()
    await send()
    const { state } = fold(of, kept.id, asEvents(await events()))
    studio.stored.push({ id: id(), piece: kept.id, round: state.round, tablet: id(), seq: 1, actor: person, kind: 'piece.put-away', v: 1, at: clock(), since: null, body: { why: 'broken', words: null }, n: 2, late: false })
    studio.late = true
    await act('hold.answered', { turn: 'cut', ask: 0, answer: { choice: 'right' } })
    expect(await send()).toBe('sent')
    expect((await stateNow()).status).toBe('put-away')
    expect(await act('fault.seen', { turn: 'cut', fault: 'tight' })).toMatchObject({ ok: false, says: 'This piece was put away.' })
  })
})

describe('pulling', () => {
  it('takes in what an instructor did, and asks only for what is new', async () => {
    await begin()
    await send()
    await pull(db, studio, kept.id)
    const { state } = fold(of, kept.id, asEvents(await events()))
    studio.stored.push({ id: id(), piece: kept.id, round: state.round, tablet: id(), seq: 1, actor: id(), kind: 'hold.released', v: 1, at: clock(), since: null, body: { turn: 'cut', words: id() }, n: 2, late: false })
    await pull(db, studio, kept.id)
    expect((await stateNow()).released).toHaveProperty('cut')
    expect(await db.get('pieces', kept.id)).toMatchObject({ pulled: 2 })
  })
})
