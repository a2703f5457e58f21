import { and, eq, isNotNull } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { openDatabase, type Db } from '#server/db/client'
import { attempts } from '#server/db/schema/people'
import { countTry, LIMITS } from '#server/services/attempts'
import { addPerson, asPerson, Caller, forgetAllTries, openStudio, openTest, PASSWORD, saysOf, type TestStudio, told } from './harness'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
beforeAll(async () => {
  ({ db, close } = openTest())
  studio = await openStudio(db)
})
beforeEach(() => forgetAllTries(db))
afterAll(async () => { await forgetAllTries(db); await close() })

const guess = (email: string, password = 'guess guess') => new Caller().post('/api/come-in', { email, password })
const refusedAt = async (work: () => Promise<void>): Promise<number | null> => await work().then(() => null, (error: unknown) => error instanceof Error && 'statusCode' in error && typeof error.statusCode === 'number' ? error.statusCode : -1)

describe('guessing', () => {
  it('at one account ends after ten wrong tries, and then the right password waits too', async () => {
    for (let i = 0; i < LIMITS.account; i++) expect((await guess(studio.emailOf('amy'))).status).toBe(401)
    const right = await guess(studio.emailOf('amy'), PASSWORD)
    expect([right.status, saysOf(right)]).toEqual([429, 'That were too many tries. Wait 15 minutes, or ask your studio for a start card.'])
    expect((await guess(studio.emailOf('dev'), PASSWORD)).status).toBe(200)
  })

  it('is counted the same at an e-mail nobody has', async () => {
    for (let i = 0; i < LIMITS.account; i++) expect((await guess('nobody.at.all@bench.example')).status).toBe(401)
    expect((await guess('nobody.at.all@bench.example')).status).toBe(429)
  })

  it('is forgiven by the right password, and by a quarter of an hour', async () => {
    for (let round = 0; round < 3; round++) {
      for (let i = 0; i < LIMITS.account - 1; i++) expect((await guess(studio.emailOf('dev'))).status).toBe(401)
      expect((await guess(studio.emailOf('dev'), PASSWORD)).status).toBe(200)
    }
    for (let i = 0; i <= LIMITS.account; i++) await guess(studio.emailOf('amy'))
    await expect(asPerson(studio.emailOf('amy'))).rejects.toThrow('429')
    await asPerson(studio.emailOf('amy'), PASSWORD, new Date(Date.now() + 15 * 60_000 + 2000))
  })

  it('from one address ends at many accounts', async () => {
    const statuses = []
    for (let i = 0; i < LIMITS.address + 1; i++) statuses.push((await guess(`nobody.${i}@bench.example`)).status)
    expect(statuses.slice(0, -1).every(status => status === 401)).toBe(true)
    expect(statuses.at(-1)).toBe(429)
  })

  it('is not helped by an invented X-Forwarded-For', async () => {
    const statuses = []
    for (let i = 0; i <= LIMITS.account; i++) statuses.push((await new Caller().ask('POST', '/api/come-in', { email: studio.emailOf('amy'), password: 'guess guess' }, { headers: { 'x-forwarded-for': `203.0.113.${i}` } })).status)
    expect(statuses.at(-1)).toBe(429)
  })

  it('of start cards ends too', async () => {
    const statuses = []
    for (let i = 0; i <= LIMITS.card; i++) statuses.push((await new Caller().post('/api/come-in/card', { code: '2345-BCDF' })).status)
    expect(statuses.slice(0, -1).every(status => status === 401)).toBe(true)
    expect(statuses.at(-1)).toBe(429)
  })
})

describe('a class of thirty behind one address', () => {
  it('comes in, each after a wrong try or two, and again', async () => {
    const emails = Array.from({ length: 30 }, (_, i) => `class.${i}.${studio.id.toLowerCase()}@bench.example`)
    for (const [i, email] of emails.entries()) await addPerson(db, studio.id, { name: `Maker ${i}`, roles: ['apprentice'], email })
    for (const [i, email] of emails.entries()) {
      for (let wrong = 0; wrong < 1 + i % 2; wrong++) expect((await guess(email)).status).toBe(401)
      expect([email, (await guess(email, PASSWORD)).status]).toEqual([email, 200])
    }
    const again = await Promise.all(emails.map(email => guess(email, PASSWORD)))
    expect(again.map(answer => answer.status)).toEqual(emails.map(() => 200))
  })
})

describe('the counts', () => {
  it('survive a restart: another process finds them in the database', async () => {
    const now = new Date()
    for (let i = 0; i < LIMITS.account; i++) await countTry(db, 'account', 'someone', now)
    const other = openDatabase(told('TEST_DATABASE_URL'), 1)
    expect(await refusedAt(() => countTry(other.db, 'account', 'someone', now))).toBe(429)
    await other.pool.end()
  })

  it('let no more through when tries come at once', async () => {
    const now = new Date()
    const through = await Promise.all(Array.from({ length: 40 }, () => refusedAt(() => countTry(db, 'account', 'all at once', now))))
    expect(through.filter(status => status === null).length).toBeLessThanOrEqual(LIMITS.account)
    expect(through.every(status => status === null || status === 429)).toBe(true)
    const counted = await db.select({ points: attempts.points }).from(attempts).where(and(isNotNull(attempts.key), eq(attempts.points, 40)))
    expect(counted).toHaveLength(1)
  })

  it('hold no e-mail and no address', async () => {
    await guess(studio.emailOf('amy'))
    expect(JSON.stringify(await db.select().from(attempts))).not.toMatch(/bench\.example|127\.0\.0\.1/)
  })
})
