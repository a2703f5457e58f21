import { eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Db } from '#server/db/client'
import { tokens } from '#server/db/schema/people'
import { memberships } from '#server/db/schema/studio'
import { dayIn } from '#shared/bench/day'
import { addPerson, Caller, forgetAllTries, letterTo, openStudio, openTest, PASSWORD, saysOf, secretIn, type TestStudio } from './harness'
import { CardsSchema, MeSchema, PeopleSchema } from './shapes'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
beforeAll(async () => {
  ({ db, close } = openTest())
  studio = await openStudio(db)
})
beforeEach(() => forgetAllTries(db))
afterAll(() => close())

const DAY = 86_400_000
const cardsPath = () => `/api/classes/${studio.world.classId}/cards`
const print = async (people: string[], more: Record<string, unknown> = {}) => CardsSchema.parse((await (await studio.as('ruth')).post(cardsPath(), { people, ...more })).body)
const comeIn = async (code: string, at: Date | null = null) => {
  const caller = new Caller()
  caller.at = at
  const answer = await caller.post('/api/come-in/card', { code })
  return { caller, answer }
}

/** An apprentice without e-mail, in the class. */
async function kit(): Promise<string> {
  const owen = await studio.as('owen')
  const id = ulid()
  const answer = await owen.post('/api/people', { id, name: 'Kit Farrow', roles: ['apprentice'], ageBand: '16-17', classId: studio.world.classId })
  expect([answer.status, answer.body]).toEqual([201, { id, is: 'joined' }])
  return id
}

describe('a start card', () => {
  it('lets an apprentice in who has no e-mail, on two tablets, until the evening ends', async () => {
    const id = await kit()
    const sheet = await print([id])
    const [card] = sheet.cards
    expect(card).toMatchObject({ personId: id, name: 'Kit Farrow' })
    expect(card?.code).toMatch(/^[23456789BCDFGHJKMNPQRSTVWXZ]{4}-[23456789BCDFGHJKMNPQRSTVWXZ]{4}$/)
    expect(sheet.on).toBe(dayIn('Europe/London', new Date()))

    const first = await comeIn(card?.code ?? '')
    expect(first.answer.status).toBe(200)
    expect(MeSchema.parse((await first.caller.get('/api/me')).body)).toMatchObject({ person: { id, name: 'Kit Farrow' }, studio: { id: studio.id }, roles: ['apprentice'], byCard: true, hasEmail: false })
    const typed = ` ${card?.code.toLowerCase().replace('-', ' ') ?? ''} `
    expect((await comeIn(typed)).answer.status).toBe(200)

    const ends = new Date(sheet.ends)
    first.caller.at = new Date(ends.getTime() + 1)
    expect((await first.caller.get('/api/me')).status).toBe(401)
    expect((await comeIn(card?.code ?? '', new Date(ends.getTime() - 1000))).answer.status).toBe(200)
    expect((await comeIn(card?.code ?? '', ends)).answer.status).toBe(401)
  })

  it('is kept as a hash only, and a new one ends the one before', async () => {
    const id = await kit()
    const [before] = (await print([id])).cards
    const [after] = (await print([id])).cards
    expect((await comeIn(before?.code ?? '')).answer.status).toBe(401)
    expect((await comeIn(after?.code ?? '')).answer.status).toBe(200)
    const kept = JSON.stringify(await db.select().from(tokens).where(eq(tokens.personId, id)))
    for (const code of [before?.code ?? '', after?.code ?? '']) expect(kept.includes(code) || kept.includes(code.replace('-', ''))).toBe(false)
  })

  it('opens no other studio of the person, and no account', async () => {
    const other = await openStudio(db)
    await db.insert(memberships).values({ studioId: other.id, id: other.id, personId: studio.idOf('dev'), trailNo: 78, roles: ['manager'], joined: new Date() })
    const { caller } = await comeIn((await print([studio.idOf('dev')])).cards[0]?.code ?? '')
    const me = MeSchema.parse((await caller.get('/api/me')).body)
    expect([me.studio?.id, me.studios.map(one => one.id), me.roles]).toEqual([studio.id, [studio.id], ['apprentice']])
    expect((await caller.post('/api/me/studio', { studioId: other.id })).status).toBe(404)
    expect((await caller.get('/api/people')).status).toBe(403)
  })

  it('is for apprentices of the class alone', async () => {
    const ruth = await studio.as('ruth')
    const ask = async (people: string[]) => await ruth.post(cardsPath(), { people })
    const outside = await addPerson(db, studio.id, { name: 'Olga Reed', roles: ['apprentice'] })
    expect((await ask([outside.id])).status).toBe(422)
    const owen = await studio.as('owen')
    expect((await owen.post(`/api/classes/${studio.world.classId}/people`, { personId: studio.idOf('imran') })).status).toBe(201)
    const answer = await ask([studio.idOf('imran')])
    expect([answer.status, saysOf(answer)]).toEqual([422, 'A start card is for apprentices. Others come in with their password.'])
    const stranger = await openStudio(db)
    expect((await ask([stranger.idOf('amy')])).status).toBe(422)
  })

  it('stops with the part: who is made an instructor, or leaves, does not come in by the card', async () => {
    const [one, two] = [await kit(), await kit()]
    const sheet = await print([one, two])
    const code = (id: string) => sheet.cards.find(card => card.personId === id)?.code ?? ''
    const owen = await studio.as('owen')
    await owen.post(`/api/people/${one}/roles`, { id: ulid(), role: 'instructor', act: 'given' })
    expect((await owen.post(`/api/people/${two}/leave`)).status).toBe(200)
    expect((await comeIn(code(one))).answer.status).toBe(401)
    expect((await comeIn(code(two))).answer.status).toBe(401)
  })

  it('is printed for one of the next days at most, and stands in the list of people', async () => {
    const id = await kit()
    const ruth = await studio.as('ruth')
    const on = (days: number) => dayIn('Europe/London', new Date(Date.now() + days * DAY))
    expect((await ruth.post(cardsPath(), { people: [id], on: on(-1) })).status).toBe(422)
    expect((await ruth.post(cardsPath(), { people: [id], on: on(9) })).status).toBe(422)
    const sheet = await print([id], { on: on(3) })
    const owen = await studio.as('owen')
    const list = PeopleSchema.parse((await owen.get('/api/people')).body)
    expect(list.people.find(person => person.id === id)).toMatchObject({ hasEmail: false, cardUntil: sheet.ends, ageBand: '16-17' })
  })

  it('leads to an e-mail and a password of their own, by a letter', async () => {
    const id = await kit()
    const { caller } = await comeIn((await print([id])).cards[0]?.code ?? '')
    const email = `kit.${id.toLowerCase()}@letters.example`
    expect((await caller.post('/api/me/email', { email })).status).toBe(202)
    expect(MeSchema.parse((await caller.get('/api/me')).body).hasEmail).toBe(false)
    const token = secretIn(await letterTo(email))
    const own = new Caller()
    expect((await own.post('/api/reset', { token, password: 'nine copper rivets' })).status).toBe(200)
    expect(MeSchema.parse((await own.get('/api/me')).body)).toMatchObject({ person: { id }, byCard: false, hasEmail: true })
    expect((await caller.get('/api/me')).status).toBe(401)

    const second = await kit()
    const { caller: other } = await comeIn((await print([second])).cards[0]?.code ?? '')
    expect((await other.post('/api/me/email', { email: studio.emailOf('amy') })).status).toBe(202)
    const taken = await new Caller().post('/api/reset', { token: secretIn(await letterTo(studio.emailOf('amy'))), password: PASSWORD })
    expect(taken.status).toBe(409)
  })
})
