import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { z } from 'zod'
import type { Db } from '#server/db/client'
import { signOffs } from '#server/db/schema/judging'
import { addLesson, DAY, fairJudgement, finishedPiece, wrappedLoop } from './judging-world'
import { Caller, forgetAllTries, openStudio, openTest, PASSWORD, saysOf, type TestStudio } from './harness'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
let ruth: Caller
beforeAll(async () => {
  ({ db, close } = openTest())
  studio = await openStudio(db)
  ruth = await studio.as('ruth')
})
beforeEach(() => forgetAllTries(db))
afterAll(() => close())

const ago = (days: number) => new Date(Date.now() - days * DAY)
const ResultsSchema = z.object({ results: z.array(z.object({ id: z.string(), ok: z.boolean() })) })
const WaitingSchema = z.object({
  items: z.array(z.object({ judgement: z.string(), judgements: z.array(z.string()), level: z.number(), n: z.number(), head: z.string() })),
  secondNames: z.array(z.object({ signOff: z.string(), reasons: z.array(z.object({ says: z.string() })) })),
})
const waiting = async (caller: Caller) => WaitingSchema.parse((await caller.get('/api/sign-offs/waiting')).body)
/** The one judgement that waits, as it is sent to be signed. */
async function toSign() {
  const [item] = (await waiting(ruth)).items
  if (!item) throw new Error('Nothing waits to be signed.')
  return { id: ulid(), judgements: item.judgements, level: item.level, n: item.n, head: item.head, words: '' }
}

describe('who may ask', () => {
  const reads = ['/api/looks', '/api/looks/count', `/api/looks/${ulid()}`, '/api/sign-offs/waiting', `/api/sign-offs/${ulid()}`, '/api/sign-offs/founding']
  const acts = ['/api/judgements', '/api/sign-offs', '/api/sign-offs/founding', `/api/sign-offs/${ulid()}/second-name`]
  it('is nobody who has not said who they are', async () => {
    for (const path of reads) expect((await new Caller().get(path)).status, path).toBe(401)
    for (const path of acts) expect((await new Caller().post(path, {})).status, path).toBe(401)
  })
  it('is no apprentice: not one list, not one act', async () => {
    const amy = await studio.as('amy')
    for (const path of reads.filter(path => !/sign-offs\/0/.test(path))) expect((await amy.get(path)).status, path).toBe(403)
    for (const path of acts) expect((await amy.post(path, {})).status, path).toBe(403)
  })
  it('a manager sees the looks, and judges and signs nothing', async () => {
    const owen = await studio.as('owen')
    expect((await owen.get('/api/looks')).status).toBe(200)
    for (const path of ['/api/judgements', '/api/sign-offs', `/api/sign-offs/${ulid()}/second-name`]) expect((await owen.post(path, {})).status, path).toBe(403)
  })
  it('sends a body that can be read, or is told what is wrong with it', async () => {
    expect((await ruth.post('/api/judgements', { id: 'x' })).status).toBe(400)
    expect((await ruth.post('/api/judgements', { ...await fairJudgement(studio.world, await finishedPiece(studio.world, ago(20), { maker: studio.world.who.amy })), extra: true })).status).toBe(400)
    expect((await ruth.get('/api/looks/not-an-id')).status).toBe(404)
  })
})

describe('a piece, from the bag to the signature', () => {
  it('is judged once for a double press, and signed once for twenty', async () => {
    const piece = await finishedPiece(studio.world, ago(10))
    const body = await fairJudgement(studio.world, piece, { level: 2 })
    const first = await ruth.post('/api/judgements', body)
    expect([first.status, (await ruth.post('/api/judgements', body)).status]).toEqual([201, 200])
    const item = await toSign()
    const wrong = await ruth.post('/api/sign-offs', { password: 'not this one', items: [item] })
    expect([wrong.status, saysOf(wrong)]).toEqual([422, 'That is not your password. Nothing was signed.'])
    expect((await waiting(ruth)).items).toHaveLength(1)
    const all = await Promise.all(Array.from({ length: 20 }, () => ruth.post('/api/sign-offs', { password: PASSWORD, items: [item] })))
    expect(all.map(answer => answer.status)).toEqual(Array.from({ length: 20 }, () => 200))
    expect(all.every(answer => ResultsSchema.parse(answer.body).results[0]?.ok)).toBe(true)
    expect(await db.select().from(signOffs).where(and(eq(signOffs.studioId, studio.id), eq(signOffs.personId, studio.idOf('dev'))))).toHaveLength(1)
    expect((await waiting(ruth)).items).toEqual([])
  })

  it('is refused to the maker, to who does not hold 5, and after more came in', async () => {
    const own = await finishedPiece(studio.world, ago(9), { maker: studio.world.who.ruth })
    expect(saysOf(await ruth.post('/api/judgements', await fairJudgement(studio.world, own)))).toBe('Nobody signs their own work.')
    const piece = await finishedPiece(studio.world, ago(9))
    const body = await fairJudgement(studio.world, piece, { level: 3 })
    const imran = await studio.as('imran')
    expect((await imran.post('/api/judgements', body)).status).toBe(403)
    const stale = await ruth.post('/api/judgements', { ...body, n: body.n - 1 })
    expect([stale.status, saysOf(stale)]).toEqual([409, '1 more thing came in. Look again.'])
    const spoilt = await ruth.post('/api/judgements', { ...body, marks: { ...body.marks, bead: { says: 'no' } } })
    expect([spoilt.status, saysOf(spoilt)]).toEqual([422, 'Essential: “Bead unmarked” is marked no.'])
    expect((await ruth.post('/api/judgements', body)).status).toBe(201)
  })

  it('is not there for a stranger, nor is its sign-off', async () => {
    const other = await openStudio(db)
    const stranger = await other.as('ruth')
    const piece = await finishedPiece(studio.world, ago(8), { maker: studio.world.who.amy })
    expect((await stranger.get(`/api/looks/${piece}`)).status).toBe(404)
    expect((await stranger.post('/api/judgements', await fairJudgement(studio.world, piece))).status).toBe(404)
    const [signed] = await db.select().from(signOffs).where(eq(signOffs.studioId, studio.id)).limit(1)
    expect((await ruth.get(`/api/sign-offs/${signed?.id}`)).status).toBe(200)
    expect((await stranger.get(`/api/sign-offs/${signed?.id}`)).status).toBe(404)
    expect((await stranger.post(`/api/sign-offs/${signed?.id}/second-name`, { id: ulid(), password: PASSWORD })).status).toBe(404)
    const foreign = await ruth.post('/api/sign-offs/founding', { id: ulid(), person: studio.idOf('ruth'), lesson: other.world.lessonId, password: PASSWORD })
    expect(foreign.status).toBe(403)
  })

  it('stands at 4 as one signature until a second instructor gives their name', async () => {
    const two = await openStudio(db)
    const first = await two.as('ruth')
    for (const [days, level, seen] of [[9, null, 'holds'], [5, null, 'holds'], [1, 4, 'whole']] as const) {
      const piece = await finishedPiece(two.world, ago(days))
      expect((await first.post('/api/judgements', await fairJudgement(two.world, piece, { level, seen }))).status).toBe(201)
    }
    const [item] = (await waiting(first)).items
    const id = ulid()
    await first.post('/api/sign-offs', { password: PASSWORD, items: [{ id, judgements: item?.judgements, level: 4, n: item?.n, head: item?.head }] })
    const view = async () => z.object({ level: z.number(), oneSignature: z.boolean(), isWhole: z.boolean(), names: z.array(z.object({ name: z.string() })) }).parse((await first.get(`/api/sign-offs/${id}`)).body)
    expect(await view()).toMatchObject({ level: 4, oneSignature: true, isWhole: true, names: [{ name: 'Ruth Calder' }] })
    expect(saysOf(await first.post(`/api/sign-offs/${id}/second-name`, { id: ulid(), password: PASSWORD }))).toBe('Yours is the first name. The second is another person’s.')
    const second = await two.as('imran')
    expect((await waiting(second)).secondNames).toMatchObject([{ signOff: id, reasons: [] }])
    const named = { id: ulid(), password: PASSWORD }
    expect([(await second.post(`/api/sign-offs/${id}/second-name`, named)).status, (await second.post(`/api/sign-offs/${id}/second-name`, named)).status]).toEqual([201, 200])
    expect(await view()).toMatchObject({ oneSignature: false, names: [{ name: 'Ruth Calder' }, { name: 'Imran Sethi' }] })
  })
})

describe('founding', () => {
  it('is the manager’s, with their password, where nobody can sign yet', async () => {
    const owen = await studio.as('owen')
    const { lessonId } = await addLesson(studio.world, studio.world.who.ruth, `ear-wires-${ulid().toLowerCase().slice(-6)}`, wrappedLoop({ title: 'Ear wires' }), ago(1))
    const given = { id: ulid(), person: studio.idOf('dilys'), lesson: lessonId, password: PASSWORD }
    const ViewSchema = z.object({ lessons: z.array(z.object({ id: z.string() })), instructors: z.array(z.object({ name: z.string() })) })
    const open = async () => ViewSchema.parse((await owen.get('/api/sign-offs/founding')).body)
    expect((await open()).lessons.map(lesson => lesson.id)).toContain(lessonId)
    expect((await open()).instructors.map(person => person.name)).toEqual(['Dilys Pugh', 'Imran Sethi', 'Ruth Calder'])
    expect((await ruth.post('/api/sign-offs/founding', given)).status).toBe(403)
    expect((await owen.post('/api/sign-offs/founding', { ...given, password: 'not this one' })).status).toBe(422)
    expect((await owen.post('/api/sign-offs/founding', { ...given, person: studio.idOf('amy') })).status).toBe(422)
    expect([(await owen.post('/api/sign-offs/founding', given)).status, (await owen.post('/api/sign-offs/founding', given)).status]).toEqual([201, 200])
  })
})

describe('permissions', () => {
  it('are given and suspended by an instructor, and seen with the reason', async () => {
    const path = `/api/people/${studio.idOf('dev')}/permissions`
    const imran = await studio.as('imran')
    const act = { id: ulid(), permission: 'flame', act: 'grant' }
    expect([(await imran.post(path, act)).status, (await imran.post(path, act)).status]).toEqual([201, 200])
    expect((await ruth.post(path, { id: ulid(), permission: 'flame', act: 'suspend' })).status).toBe(422)
    expect((await ruth.post(path, { id: ulid(), permission: 'flame', act: 'suspend', words: 'Walked off with the gas on.' })).status).toBe(201)
    expect((await (await studio.as('amy')).post(path, { id: ulid(), permission: 'motors', act: 'grant' })).status).toBe(403)
    const view = z.object({ held: z.array(z.object({ permission: z.string(), state: z.string() })), acts: z.array(z.object({ words: z.string().nullable() })) }).parse((await ruth.get(path)).body)
    expect(view.held[0]).toEqual({ permission: 'flame', state: 'suspended' })
    expect(view.acts.at(-1)?.words).toBe('Walked off with the gas on.')
  })
})
