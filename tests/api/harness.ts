/** Speaks to the built application as a browser would, with the database beside it for arranging. */
import { eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { z } from 'zod'
import { type Db, openDatabase } from '#server/db/client'
import { attempts, people, personNames } from '#server/db/schema/people'
import { memberships } from '#server/db/schema/studio'
import { passwordsAt } from '#server/services/passwords'
import type { Role } from '#shared/schemas/lists'
import type { NAMES, World} from './judging-world';
import { makeWorld } from './judging-world'

export const PASSWORD = 'third hand bench'
/** As the tests' server is told; what is shipped is asserted elsewhere. */
const SCRYPT_LOG2 = 12

/** What `npm test` tells each test: TEST_BASE_URL, TEST_DATABASE_URL, TEST_OWNER_URL, TEST_CATCHER_URL. */
export function told(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is missing: run npm run test:api.`)
  return value
}

/** The database with the application's own rights. */
export function openTest(): { db: Db, close: () => Promise<void> } {
  const { db, pool } = openDatabase(told('TEST_DATABASE_URL'), 4)
  return { db, close: () => pool.end() }
}

export interface Answer { status: number, body: unknown, headers: Headers }
export interface AskMore { headers?: Record<string, string>, raw?: { type: string, bytes: string | Uint8Array<ArrayBuffer> } }
export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'

/** One browser: keeps its cookies; `at` is the time the server is told. */
export class Caller {
  readonly cookies = new Map<string, string>()
  at: Date | null = null

  async ask(method: Method, path: string, body?: unknown, { headers = {}, raw }: AskMore = {}): Promise<Answer> {
    const base = told('TEST_BASE_URL')
    const sent = raw?.bytes ?? (body === undefined ? undefined : JSON.stringify(body))
    const response = await fetch(`${base}${path}`, {
      method, redirect: 'manual', body: sent,
      headers: {
        ...method === 'GET' ? {} : { 'origin': base, 'sec-fetch-site': 'same-origin' }, ...sent === undefined ? {} : { 'content-type': raw?.type ?? 'application/json' },
        ...this.at ? { 'x-thirdhand-now': this.at.toISOString() } : {}, ...this.cookies.size > 0 ? { cookie: [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ') } : {}, ...headers,
      },
    })
    this.keep(response.headers.getSetCookie())
    const text = await response.text()
    const isJson = response.headers.get('content-type')?.startsWith('application/json') ?? false
    const read: unknown = isJson && text !== '' ? JSON.parse(text) : text
    return { status: response.status, body: read, headers: response.headers }
  }

  get = (path: string) => this.ask('GET', path)
  post = (path: string, body?: unknown) => this.ask('POST', path, body)

  /** A second browser that has a copy of these cookies. */
  copy(): Caller {
    const other = new Caller()
    for (const [name, value] of this.cookies) other.cookies.set(name, value)
    other.at = this.at
    return other
  }

  private keep(lines: string[]): void {
    for (const line of lines) {
      const [pair = '', ...rest] = line.split(';')
      const at = pair.indexOf('=')
      const value = pair.slice(at + 1)
      if (value === '' || rest.some(part => /^\s*max-age=0$/i.test(part))) this.cookies.delete(pair.slice(0, at))
      else this.cookies.set(pair.slice(0, at), value)
    }
  }
}

/** Comes in by e-mail and password; a name without @ is one of the demo studio's people. */
export async function asPerson(email: string, password = PASSWORD, at: Date | null = null): Promise<Caller> {
  const caller = new Caller()
  caller.at = at
  const { status, body } = await caller.post('/api/come-in', { email: email.includes('@') ? email : `${email}@tallow-yard.example`, password })
  if (status !== 200) throw new Error(`${email} did not come in: ${status} ${JSON.stringify(body)}`)
  return caller
}

export type Part = keyof typeof NAMES | 'marian'
export interface TestStudio { world: World, id: string, emailOf: (who: Part) => string, idOf: (who: Part) => string, as: (who: Part) => Promise<Caller> }

let hash: string | null = null
/** The hash of PASSWORD: one for all, as making it takes a while. */
export async function passwordHash(): Promise<string> {
  hash ??= await passwordsAt(SCRYPT_LOG2).make(PASSWORD)
  return hash
}

/** A studio of its own, of strangers to every other: instructors, a manager, two apprentices in a class, an assessor; a lesson in use. All have PASSWORD. */
export async function openStudio(db: Db, at = new Date(Date.now() - 30 * 86_400_000)): Promise<TestStudio> {
  const world = await makeWorld(db, at)
  const marian = await addPerson(db, world.studioId, { name: 'Marian Voss', roles: ['assessor'] })
  const ids: Record<Part, string> = { ruth: world.who.ruth.personId, imran: world.who.imran.personId, dilys: world.who.dilys.personId, owen: world.who.owen.personId, dev: world.who.dev.personId, amy: world.who.amy.personId, marian: marian.id }
  const emailOf = (who: Part) => `${who}.${world.studioId.toLowerCase()}@bench.example`
  for (const who of ['ruth', 'imran', 'dilys', 'owen', 'dev', 'amy', 'marian'] as const) {
    await db.update(people).set({ email: emailOf(who), emailKey: emailOf(who), passwordHash: await passwordHash() }).where(eq(people.id, ids[who]))
  }
  return { world, id: world.studioId, emailOf, idOf: who => ids[who], as: who => asPerson(emailOf(who)) }
}

/** One more person of a studio, straight into the tables. */
export async function addPerson(db: Db, studioId: string, { name, roles, email }: { name: string, roles: Role[], email?: string }): Promise<{ id: string }> {
  const id = ulid()
  await db.insert(people).values({ id, email: email ?? null, emailKey: email?.toLowerCase() ?? null, passwordHash: email ? await passwordHash() : null, wants: {} })
  await db.insert(personNames).values({ personId: id, version: 1, name, fromAt: new Date() })
  await db.insert(memberships).values({ studioId, id: ulid(), personId: id, trailNo: 5000 + Math.floor(Math.random() * 1_000_000), roles, joined: new Date() })
  return { id }
}

/** Tests that guess passwords begin with clean counts. */
export async function forgetAllTries(db: Db): Promise<void> {
  await db.delete(attempts)
}

const LetterSchema = z.object({ id: z.string(), to: z.array(z.string()), subject: z.string(), text: z.string(), html: z.string() })
export type CaughtLetter = z.infer<typeof LetterSchema>

/** Letters that were caught for an address, newest first. */
export async function lettersTo(address: string): Promise<CaughtLetter[]> {
  const response = await fetch(`${told('TEST_CATCHER_URL')}/mails`)
  return z.array(LetterSchema).parse(await response.json()).filter(letter => letter.to.includes(address))
}

/** Waits until so many letters were caught for an address, at most ten seconds, and returns the newest. */
export async function letterTo(address: string, count = 1): Promise<CaughtLetter> {
  const end = Date.now() + 10_000
  for (;;) {
    const letters = await lettersTo(address)
    const [newest] = letters
    if (newest && letters.length >= count) return newest
    if (Date.now() > end) throw new Error(`${letters.length} letters came for ${address}, not ${count}.`)
    await new Promise(resolve => setTimeout(resolve, 50))
  }
}

/** The secret of the link in a letter. */
export function secretIn(letter: CaughtLetter): string {
  const secret = /\/come-in\/([A-Za-z0-9_-]{43})/.exec(letter.text)?.[1]
  if (!secret) throw new Error('There is no link in this letter.')
  return secret
}

export const FieldErrorsSchema = z.object({ data: z.object({ fieldErrors: z.record(z.string(), z.array(z.string())), formErrors: z.array(z.string()).default([]) }) })
/** The sentence of an answer. */
export const saysOf = (answer: Answer): string => z.object({ message: z.string() }).parse(answer.body).message
