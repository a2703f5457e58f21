import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Db } from '#server/db/client'
import { people, securityLog, sessions } from '#server/db/schema/people'
import { memberships } from '#server/db/schema/studio'
import { comeIn, type Door } from '#server/services/come-in'
import { passwordsAt, SHIPPED_LOG2 } from '#server/services/passwords'
import { ABSOLUTE_MS, IDLE_MS } from '#server/services/sessions'
import { MeSchema } from './shapes'
import { addPerson, asPerson, Caller, forgetAllTries, openStudio, openTest, PASSWORD, saysOf, type TestStudio, told } from './harness'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
beforeAll(async () => {
  ({ db, close } = openTest())
  studio = await openStudio(db)
})
beforeEach(() => forgetAllTries(db))
afterAll(() => close())

const me = async (caller: Caller) => MeSchema.parse((await caller.get('/api/me')).body)

describe('coming in', () => {
  it('tells who is here, their studio and what they may do in it', async () => {
    expect(await me(await studio.as('amy'))).toMatchObject({ person: { id: studio.idOf('amy'), name: 'Amy Brandt', hand: 'right' }, studio: { id: studio.id }, roles: ['apprentice'], may: ['make-pieces', 'see-own-record', 'ask-for-a-look'], byCard: false, hasEmail: true })
  })

  it('takes an e-mail as it is typed', async () => {
    expect((await new Caller().post('/api/come-in', { email: `  ${studio.emailOf('amy').toUpperCase()} `, password: PASSWORD })).status).toBe(200)
  })

  it('puts nothing into the cookie a page could read, and tells nothing of it', async () => {
    const caller = await studio.as('ruth')
    const { body } = await caller.get('/api/_auth/session')
    expect(Object.keys(body ?? {})).toEqual(['id'])
    expect(JSON.stringify(body)).not.toContain(studio.idOf('ruth'))
    const answer = await new Caller().post('/api/come-in', { email: studio.emailOf('ruth'), password: PASSWORD })
    expect(answer.headers.getSetCookie()).toHaveLength(1)
    expect(answer.headers.getSetCookie()[0]).toMatch(/HttpOnly/i)
    expect(answer.headers.getSetCookie()[0]).toMatch(/SameSite=Lax/i)
  })

  it('gives no cookie to who only asks', async () => {
    const answer = await new Caller().get('/api/me')
    expect([answer.status, answer.headers.getSetCookie()]).toEqual([401, []])
  })

  it('does not take a sealed session out of a header', async () => {
    const caller = await studio.as('amy')
    const [sealed = ''] = caller.cookies.values()
    expect((await new Caller().ask('GET', '/api/me', undefined, { headers: { 'x-thirdhand-session': sealed, 'x-nuxt-session-session': sealed } })).status).toBe(401)
  })

  it('says the same for an unknown e-mail and a wrong password', async () => {
    const unknown = await new Caller().post('/api/come-in', { email: 'nobody@bench.example', password: 'wrong wrong' })
    const wrong = await new Caller().post('/api/come-in', { email: studio.emailOf('amy'), password: 'wrong wrong' })
    expect([unknown.status, saysOf(unknown)]).toEqual([401, saysOf(wrong)])
    expect(wrong.status).toBe(401)
  })

  it('begins under a new number, and ends what the browser had before', async () => {
    const caller = await studio.as('amy')
    const before = caller.copy()
    expect((await caller.post('/api/come-in', { email: studio.emailOf('dev'), password: PASSWORD })).status).toBe(200)
    expect((await me(caller)).person.id).toBe(studio.idOf('dev'))
    expect((await before.get('/api/me')).status).toBe(401)
  })
})

describe('the work done', () => {
  it('is the same for an unknown e-mail, a wrong password and an account without one', async () => {
    const counting = { made: 0, checked: 0 }
    const real = passwordsAt(10)
    const passwords: Door['passwords'] = { ...real, check: (hash, password) => { counting.checked++; return real.check(hash, password) }, make: (password) => { counting.made++; return real.make(password) } }
    const without = `without.${studio.id.toLowerCase()}@bench.example`
    await db.update(people).set({ passwordHash: null }).where(eq(people.id, (await addPerson(db, studio.id, { name: 'Una Wray', roles: ['apprentice'], email: without })).id))
    const door: Door = { db, passwords, address: '198.51.100.7', agent: '', now: new Date() }
    for (const email of ['nobody@bench.example', studio.emailOf('amy'), without]) {
      counting.checked = 0
      await expect(comeIn(door, email, 'wrong wrong')).rejects.toMatchObject({ statusCode: 401 })
      expect([email, counting]).toEqual([email, { made: 0, checked: 1 }])
    }
  })

  it('costs what OWASP asks, as shipped: N 2^17, r 8, p 1', async () => {
    // OWASP Password Storage Cheat Sheet: scrypt with N=2^17 (128 MiB), r=8, p=1.
    expect(SHIPPED_LOG2).toBe(17)
    expect(await passwordsAt(SHIPPED_LOG2).make('three odd words')).toMatch(/^\$scrypt\$n=131072,r=8,p=1\$/)
  })

  it('hashes again, with the numbers of today, a password that was hashed with others', async () => {
    const email = `old.${studio.id.toLowerCase()}@bench.example`
    const { id } = await addPerson(db, studio.id, { name: 'Ola Finch', roles: ['apprentice'], email })
    const old = await passwordsAt(11).make(PASSWORD)
    await db.update(people).set({ passwordHash: old }).where(eq(people.id, id))
    await asPerson(email)
    const [row] = await db.select({ hash: people.passwordHash }).from(people).where(eq(people.id, id))
    expect(row?.hash).toMatch(/^\$scrypt\$n=4096,/)
    await asPerson(email)
  })
})

describe('leaving', () => {
  it('ends what a copy of the cookie opens', async () => {
    const caller = await studio.as('amy')
    const copy = caller.copy()
    expect((await copy.get('/api/me')).status).toBe(200)
    expect((await caller.post('/api/finished')).status).toBe(200)
    expect((await copy.get('/api/me')).status).toBe(401)
    expect((await caller.get('/api/me')).status).toBe(401)
    expect((await caller.post('/api/finished')).status).toBe(200)
  })

  it('ends by a new epoch everywhere at once', async () => {
    const [one, two] = [await studio.as('dilys'), await studio.as('dilys')]
    const [row] = await db.select({ epoch: people.epoch }).from(people).where(eq(people.id, studio.idOf('dilys')))
    await db.update(people).set({ epoch: (row?.epoch ?? 0) + 1 }).where(eq(people.id, studio.idOf('dilys')))
    expect([(await one.get('/api/me')).status, (await two.get('/api/me')).status]).toEqual([401, 401])
  })

  it('comes by itself after a time without anything done, and at the latest after the longest time', async () => {
    const begin = new Date()
    const after = (ms: number) => new Date(begin.getTime() + ms)
    const idle = await asPerson(studio.emailOf('amy'), PASSWORD, begin)
    idle.at = after(IDLE_MS - 60_000)
    expect((await idle.get('/api/me')).status).toBe(200)
    idle.at = after(2 * IDLE_MS - 120_000)
    expect((await idle.get('/api/me')).status).toBe(200)
    idle.at = after(3 * IDLE_MS)
    expect((await idle.get('/api/me')).status).toBe(401)

    const long = await asPerson(studio.emailOf('amy'), PASSWORD, begin)
    for (let ms = IDLE_MS / 2; ms < ABSOLUTE_MS; ms += IDLE_MS / 2) {
      long.at = after(ms)
      expect((await long.get('/api/me')).status).toBe(200)
    }
    long.at = after(ABSOLUTE_MS)
    expect((await long.get('/api/me')).status).toBe(401)
  })
})

describe('parts', () => {
  it('are read at each request: who is demoted is refused at the next', async () => {
    const imran = await studio.as('imran')
    expect((await imran.get('/api/lessons')).status).toBe(200)
    const owen = await studio.as('owen')
    expect((await owen.post(`/api/people/${studio.idOf('imran')}/roles`, { id: '01KCZDEM0TED000000000000AA', role: 'instructor', act: 'ended' })).status).toBe(200)
    expect((await imran.get('/api/lessons')).status).toBe(403)
    expect((await imran.get('/api/me')).status).toBe(200)
  })

  it('are of one studio: a second one is taken in hand by its own press, a strange one is not there', async () => {
    const other = await openStudio(db)
    const third = await openStudio(db)
    await db.insert(memberships).values({ studioId: other.id, id: other.id, personId: studio.idOf('ruth'), trailNo: 77, roles: ['manager'], joined: new Date() })
    const ruth = await studio.as('ruth')
    expect((await ruth.post('/api/me/studio', { studioId: other.id })).status).toBe(200)
    expect((await me(ruth)).roles).toEqual(['manager'])
    expect((await ruth.get(`/api/people/${studio.idOf('amy')}`)).status).toBe(404)
    expect((await ruth.get(`/api/people/${other.idOf('amy')}`)).status).toBe(200)
    expect((await ruth.post('/api/me/studio', { studioId: third.id })).status).toBe(404)
    expect((await ruth.post('/api/me/studio', { studioId: studio.id })).status).toBe(200)
    expect((await me(ruth)).roles).toEqual(['instructor'])
    expect((await ruth.get('/api/people')).status).toBe(403)
  })
})

describe('requests of another site', () => {
  const email = () => ({ email: studio.emailOf('amy'), password: PASSWORD })

  it('are not done: neither by Sec-Fetch-Site nor by Origin, nor as a form', async () => {
    const ask = (headers: Record<string, string>) => fetch(`${told('TEST_BASE_URL')}/api/come-in`, { method: 'POST', body: JSON.stringify(email()), headers: { 'content-type': 'application/json', ...headers } })
    const cross = await ask({ 'sec-fetch-site': 'cross-site' })
    const sibling = await ask({ 'sec-fetch-site': 'same-site' })
    const origin = await ask({ origin: 'https://elsewhere.example' })
    const none = await ask({ origin: 'null' })
    expect([cross, sibling, origin, none].map(answer => answer.status)).toEqual([403, 403, 403, 403])
    const form = await new Caller().ask('POST', '/api/come-in', undefined, { raw: { type: 'application/x-www-form-urlencoded', bytes: 'email=a&password=b' } })
    const plain = await new Caller().ask('POST', '/api/come-in', undefined, { raw: { type: 'text/plain', bytes: JSON.stringify(email()) } })
    const picture = await new Caller().ask('POST', '/api/come-in', undefined, { raw: { type: 'image/png', bytes: JSON.stringify(email()) } })
    expect([form.status, plain.status, picture.status]).toEqual([415, 415, 415])
    expect((await ask({ origin: told('TEST_BASE_URL') })).status).toBe(200)
  })

  it('leave no trace in what is kept', async () => {
    const count = async () => (await db.select({ id: sessions.id }).from(sessions).where(eq(sessions.personId, studio.idOf('dev')))).length
    const before = await count()
    const caller = new Caller()
    await caller.ask('POST', '/api/come-in', { email: studio.emailOf('dev'), password: PASSWORD }, { headers: { 'sec-fetch-site': 'cross-site' } })
    expect([await count(), caller.cookies.size]).toEqual([before, 0])
  })
})

describe('what is sent', () => {
  it('is refused with a field nobody asked for', async () => {
    const answer = await new Caller().post('/api/come-in', { email: studio.emailOf('amy'), password: PASSWORD, role: 'manager' })
    expect(answer.status).toBe(400)
    expect(answer.body).toMatchObject({ data: { formErrors: ['Not asked for: role.'] } })
    const amy = await studio.as('amy')
    expect((await amy.ask('PATCH', '/api/me', { hand: 'left', epoch: 9 })).status).toBe(400)
    expect((await amy.ask('PATCH', '/api/me', { hand: 'left' })).body).toMatchObject({ person: { hand: 'left' } })
  })

  it('is refused when it is no JSON, with nothing of it said back', async () => {
    const answer = await new Caller().ask('POST', '/api/come-in', undefined, { raw: { type: 'application/json', bytes: '{"email": <b>' } })
    expect(answer.status).toBe(400)
    expect(JSON.stringify(answer.body)).not.toContain('<b>')
  })
})

describe('the answers', () => {
  it('carry the headers that keep other sites and caches out', async () => {
    for (const path of ['/api/me', '/come-in', '/api/nothing']) {
      const { headers } = await new Caller().get(path)
      expect(headers.get('strict-transport-security')).toContain('max-age=31536000')
      expect(headers.get('x-content-type-options')).toBe('nosniff')
      expect(headers.get('access-control-allow-origin')).toBeNull()
      expect(headers.get('content-security-policy')).toContain("frame-ancestors 'none'")
    }
    expect((await new Caller().get('/api/me')).headers.get('cache-control')).toBe('no-store')
    expect((await new Caller().get('/__nuxt_island/x')).status).toBe(404)
  })

  it('hold no hash, no e-mail of another and no secret', async () => {
    const owen = await studio.as('owen')
    const list = JSON.stringify((await owen.get('/api/people')).body)
    expect(list).toContain('Amy Brandt')
    for (const secret of ['scrypt', 'passwordHash', 'epoch', '@bench.example']) expect(list).not.toContain(secret)
  })

  it('leave a line for who looks after the studio, without the password', async () => {
    await new Caller().post('/api/come-in', { email: studio.emailOf('amy'), password: 'guess guess' })
    const lines = await db.select().from(securityLog).where(eq(securityLog.person, studio.idOf('amy')))
    expect(lines.map(line => line.what)).toContain('come-in-refused')
    expect(JSON.stringify(lines)).not.toContain('guess')
  })
})
