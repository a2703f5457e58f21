import { eq, inArray } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Db } from '#server/db/client'
import { register } from '#server/db/schema/judging'
import { mail, people, tokens } from '#server/db/schema/people'
import { inTransaction } from '#server/db/transaction'
import { sendWaiting, queueMail, waitAfter } from '#server/services/mail'
import { verify } from '#server/services/register'
import { asPerson, Caller, forgetAllTries, lettersTo, letterTo, openStudio, openTest, PASSWORD, saysOf, secretIn, type TestStudio } from './harness'
import { ClassSchema, MeSchema, PeopleSchema } from './shapes'

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
const NEW = 'seven brass thimbles'
let made = 0
const newAddress = () => `new.${++made}.${studio.id.toLowerCase()}@letters.example`
const invite = async (email: string, more: Record<string, unknown> = {}) => {
  const owen = await studio.as('owen')
  const id = ulid()
  return { owen, id, answer: await owen.post('/api/people', { id, name: 'Nora Quill', email, roles: ['apprentice'], ...more }) }
}

describe('an invitation', () => {
  it('goes from the press to the bench: letter, link, password, class, register', async () => {
    const email = newAddress()
    const { owen, id, answer } = await invite(email, { classId: studio.world.classId, ageBand: '16-17' })
    expect([answer.status, answer.body]).toEqual([201, { id, is: 'invited' }])
    const waiting = PeopleSchema.parse((await owen.get('/api/people')).body)
    expect(waiting.invitations).toMatchObject([{ id, name: 'Nora Quill', email }])
    expect(waiting.people.map(person => person.name)).not.toContain('Nora Quill')

    const letter = await letterTo(email)
    expect(letter.text.split('\n')[0]).toBe('Owen Tait of Tallow Yard Bench School invites you.')
    expect(letter.text).toMatch(/from: Tallow Yard Bench School {2}\| {2}about: .* {2}\| {2}date: \d{4}-\d\d-\d\d {2}\| {2}sheet: 1 of 1\s*$/)
    const token = secretIn(letter)
    const nora = new Caller()
    expect((await nora.post('/api/link', { token })).body).toEqual({ kind: 'invitation', name: 'Nora Quill', studio: 'Tallow Yard Bench School', isKnown: false })
    expect((await nora.post('/api/reset', { token, name: 'Nora Quill-Hart', password: NEW })).status).toBe(200)
    expect(MeSchema.parse((await nora.get('/api/me')).body)).toMatchObject({ person: { name: 'Nora Quill-Hart' }, studio: { id: studio.id }, roles: ['apprentice'], byCard: false })
    const inClass = ClassSchema.parse((await owen.get(`/api/classes/${studio.world.classId}`)).body)
    expect(inClass.people.map(person => person.name)).toContain('Nora Quill-Hart')
    await asPerson(email, NEW)
    const acts = await db.select({ act: register.act, actor: register.actor }).from(register).where(eq(register.studioId, studio.id))
    expect(acts).toEqual(expect.arrayContaining([{ act: 'person-joined', actor: studio.idOf('owen') }, { act: 'role-given', actor: studio.idOf('owen') }]))
    expect((await verify(db, studio.id)).broken).toBeNull()
  })

  it('works once, also when it is pressed twice at the same moment', async () => {
    const email = newAddress()
    await invite(email)
    const token = secretIn(await letterTo(email))
    const answers = await Promise.all([1, 2, 3].map(() => new Caller().post('/api/reset', { token, password: NEW })))
    expect(answers.map(answer => answer.status).sort()).toEqual([200, 404, 404])
    expect((await new Caller().post('/api/link', { token })).status).toBe(404)
  })

  it('ends after fourteen days, when it is taken back, and when who sent it may not any more', async () => {
    const [old, back, gone] = [newAddress(), newAddress(), newAddress()]
    await invite(old)
    const late = new Caller()
    late.at = new Date(Date.now() + 14 * DAY + 60_000)
    expect((await late.post('/api/reset', { token: secretIn(await letterTo(old)), password: NEW })).status).toBe(404)

    const { owen, id } = await invite(back)
    const token = secretIn(await letterTo(back))
    expect((await owen.ask('DELETE', `/api/invitations/${id}`)).status).toBe(200)
    expect((await new Caller().post('/api/reset', { token, password: NEW })).status).toBe(404)

    const ruth = await studio.as('ruth')
    await owen.post(`/api/people/${studio.idOf('ruth')}/roles`, { id: ulid(), role: 'manager', act: 'given' })
    expect((await ruth.post('/api/people', { id: ulid(), name: 'Pia Stone', email: gone, roles: ['manager'] })).status).toBe(201)
    const hers = secretIn(await letterTo(gone))
    await owen.post(`/api/people/${studio.idOf('ruth')}/roles`, { id: ulid(), role: 'manager', act: 'ended' })
    expect((await new Caller().post('/api/reset', { token: hers, password: NEW })).status).toBe(404)
    expect(await db.select().from(people).where(eq(people.emailKey, gone))).toEqual([])
  })

  it('of a person known elsewhere tells the studio nothing, asks their own password and joins them', async () => {
    const other = await openStudio(db)
    const email = other.emailOf('amy')
    const { owen } = await invite(email)
    expect(JSON.stringify((await owen.get('/api/people')).body)).not.toContain(other.idOf('amy'))
    const token = secretIn(await letterTo(email))
    expect((await new Caller().post('/api/link', { token })).body).toMatchObject({ isKnown: true })
    const wrong = await new Caller().post('/api/reset', { token, password: NEW })
    expect(wrong.status).toBe(401)
    const amy = new Caller()
    expect((await amy.post('/api/reset', { token, password: PASSWORD })).status).toBe(200)
    const me = MeSchema.parse((await amy.get('/api/me')).body)
    expect(me.person.id).toBe(other.idOf('amy'))
    expect(me.studios.map(one => one.id).sort()).toEqual([other.id, studio.id].sort())
  })

  it('is one for one press, and is not sent to who is in the studio already', async () => {
    const email = newAddress()
    const owen = await studio.as('owen')
    const body = { id: ulid(), name: 'Nora Quill', email, roles: ['apprentice'] }
    expect((await Promise.all([owen.post('/api/people', body), owen.post('/api/people', body)])).map(answer => answer.status)).toEqual([201, 201])
    await letterTo(email)
    await owen.post('/api/people', body)
    expect(await lettersTo(email)).toHaveLength(1)
    expect((await invite(studio.emailOf('dev'))).answer.status).toBe(409)
  })

  it('with no letter is no invitation: both are in one transaction', async () => {
    const email = newAddress()
    const owen = await studio.as('owen')
    const answer = await owen.post('/api/people', { id: ulid(), name: 'Nora Quill', email, roles: ['apprentice'], classId: ulid() })
    expect(answer.status).toBe(404)
    expect(await db.select().from(tokens).where(eq(tokens.emailKey, email))).toEqual([])
    expect(await db.select().from(mail).where(eq(mail.toAddress, email))).toEqual([])
  })
})

describe('a new password', () => {
  it('comes by letter, works once within the hour, and ends every session', async () => {
    const email = studio.emailOf('dilys')
    const before = await studio.as('dilys')
    expect((await new Caller().post('/api/forgotten', { email })).status).toBe(202)
    const token = secretIn(await letterTo(email))
    const caller = new Caller()
    expect((await caller.post('/api/reset', { token, password: NEW })).status).toBe(200)
    expect((await caller.get('/api/me')).status).toBe(200)
    expect((await before.get('/api/me')).status).toBe(401)
    expect((await new Caller().post('/api/reset', { token, password: NEW })).status).toBe(404)
    await expect(asPerson(email)).rejects.toThrow('401')
    await asPerson(email, NEW)

    await new Caller().post('/api/forgotten', { email })
    const late = new Caller()
    late.at = new Date(Date.now() + 61 * 60_000)
    expect((await late.post('/api/reset', { token: secretIn(await letterTo(email, 2)), password: NEW })).status).toBe(404)
  })

  it('is asked for in the same words where nobody is known, and no letter goes', async () => {
    const known = await new Caller().post('/api/forgotten', { email: studio.emailOf('amy') })
    const unknown = await new Caller().post('/api/forgotten', { email: 'nobody@letters.example' })
    expect([unknown.status, unknown.body]).toEqual([known.status, known.body])
    await letterTo(studio.emailOf('amy'))
    expect(await lettersTo('nobody@letters.example')).toEqual([])
  })

  it('is at least eight letters of any kind, not a common one, and as long as one likes up to 200', async () => {
    const email = newAddress()
    await invite(email)
    const token = secretIn(await letterTo(email))
    const say = async (password: string) => (await new Caller().post('/api/reset', { token, password }))
    for (const password of ['seven77', 'password1', 'QWERTY123', 'silversmith', 'x'.repeat(201)]) {
      const answer = await say(password)
      expect([password, answer.status]).toEqual([password, 400])
      expect(answer.body).toMatchObject({ data: { fieldErrors: { password: [expect.any(String)] } } })
    }
    const long = `${'kiln and flux and '.repeat(7)}ß漢🔥`
    expect((await say(long)).status).toBe(200)
    await asPerson(email, long)
    await expect(asPerson(email, long.slice(0, 72))).rejects.toThrow('401')
  })

  it('is nothing anybody can find in the tables', async () => {
    await new Caller().post('/api/forgotten', { email: studio.emailOf('amy') })
    const secret = secretIn(await letterTo(studio.emailOf('amy'), 2))
    const kept = JSON.stringify([await db.select().from(tokens), await db.select().from(mail)])
    expect(kept).not.toContain(secret)
    expect(secret).toHaveLength(43)
  })
})

describe('the queue', () => {
  const queue = async (now: Date, dedupeKey = ulid()) => {
    await inTransaction(db, tx => queueMail(tx, { studioId: studio.id, toPerson: studio.idOf('amy'), kind: 'second-name', body: { lesson: 'Jump rings', level: 4, by: studio.idOf('ruth') }, dedupeKey }, now))
    const [row] = await db.select().from(mail).where(eq(mail.dedupeKey, dedupeKey))
    if (!row) throw new Error('The letter is not in the queue.')
    return row.id
  }
  const stateOf = async (id: string) => (await db.select({ state: mail.state, tries: mail.tries, nextAt: mail.nextAt }).from(mail).where(eq(mail.id, id)))[0]
  // Far ahead, so that the running server takes none of these itself.
  const ahead = (days: number) => new Date(Date.now() + days * DAY)

  it('holds one letter for one key', async () => {
    const key = ulid()
    await queue(ahead(100), key)
    await queue(ahead(100), key)
    expect(await db.select().from(mail).where(eq(mail.dedupeKey, key))).toHaveLength(1)
  })

  it('tries again, waiting longer each time, gives up visibly, and sends when told to', async () => {
    let now = ahead(1000)
    const id = await queue(now)
    const errors: string[] = []
    const post = { publicUrl: 'http://localhost', send: () => { errors.push('no'); return Promise.reject(new Error('no such host')) } }
    for (let tries = 1; tries <= 8; tries++) {
      await sendWaiting(db, post, now)
      const row = await stateOf(id)
      expect([row?.tries, row?.state]).toEqual([tries, tries < 8 ? 'waits' : 'given-up'])
      if (tries < 8) expect(row?.nextAt.getTime()).toBe(now.getTime() + waitAfter(tries))
      now = row?.nextAt ?? now
    }
    await sendWaiting(db, post, new Date(now.getTime() + DAY))
    expect((await stateOf(id))?.tries).toBe(8)
    const owen = await studio.as('owen')
    expect((await owen.get('/api/letters')).body).toContainEqual({ id, kind: 'second-name', to: 'Amy Brandt', tries: 8 })
    const count = (await lettersTo(studio.emailOf('amy'))).length
    expect((await owen.post(`/api/letters/${id}/again`)).status).toBe(200)
    expect((await letterTo(studio.emailOf('amy'), count + 1)).subject).toContain('a second name')
    expect(JSON.stringify((await owen.get('/api/letters')).body)).not.toContain(id)
  })

  it('sends each letter once with several senders at work', async () => {
    const now = ahead(2000)
    const ids = await Promise.all(Array.from({ length: 12 }, () => queue(now)))
    const sent: string[] = []
    const post = { publicUrl: 'http://localhost', send: async (letter: { messageId: string }) => { sent.push(letter.messageId) } }
    await Promise.all([1, 2, 3, 4].map(() => sendWaiting(db, post, now)))
    const mine = sent.filter(messageId => ids.some(id => messageId.includes(id)))
    expect(new Set(mine).size).toBe(12)
    expect(mine).toHaveLength(12)
  })

  it('sends a long queue at one kick, and a new letter after it without a wait', async () => {
    const now = new Date(Date.now() - DAY)
    const ids = await Promise.all(Array.from({ length: 45 }, () => queue(now)))
    const email = newAddress()
    await invite(email)
    await letterTo(email)
    const rows = await db.select({ state: mail.state }).from(mail).where(inArray(mail.id, ids))
    expect(rows.filter(row => row.state === 'sent')).toHaveLength(45)
  })

  it('tells no one of another studio what could not be sent', async () => {
    const other = await openStudio(db)
    const id = await queue(ahead(3000))
    const owen = await other.as('owen')
    expect((await owen.get('/api/letters')).body).toEqual([])
    expect((await owen.post(`/api/letters/${id}/again`)).status).toBe(404)
  })
})

describe('the caught letters', () => {
  it('can be read on this machine where a catcher runs', async () => {
    const { status, body } = await new Caller().get('/api/caught')
    expect(status).toBe(200)
    expect(JSON.stringify(body)).toContain('invites you')
  })
})

describe('an e-mail of their own', () => {
  it('is for who has none; a refused one says so', async () => {
    const amy = await studio.as('amy')
    const answer = await amy.post('/api/me/email', { email: newAddress() })
    expect([answer.status, saysOf(answer)]).toEqual([409, 'You have an e-mail here already.'])
  })
})
