import { readdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Db } from '#server/db/client'
import { pictures, revisionPictures } from '#server/db/schema/lessons'
import { mail, people, personNames, tokens } from '#server/db/schema/people'
import { notes, photos, words } from '#server/db/schema/pieces'
import { judgePiece } from '#server/services/judgements'
import { sha256 } from '#shared/lesson/canonical'
import { MAY } from '#shared/judging/roles'
import { ROLES, type Role } from '#shared/schemas/lists'
import { Caller, asPerson, FieldErrorsSchema, forgetAllTries, type Method, openStudio, openTest, type Part, passwordHash, type TestStudio } from './harness'
import { fairJudgement, finishedPiece, giveLevel } from './judging-world'
import { type Ids, type Line, ROUTES } from './routes-table'

const API = fileURLToPath(new URL('../../server/api', import.meta.url))
const FILES = readdirSync(API, { recursive: true, encoding: 'utf8' }).filter(file => file.endsWith('.ts')).sort()
const METHODS: Record<string, Method> = { get: 'GET', post: 'POST', put: 'PUT', patch: 'PATCH', delete: 'DELETE' }
const WHO: Record<Role, Part> = { apprentice: 'dev', instructor: 'ruth', manager: 'owen', assessor: 'marian' }
const BODIES = new Set<Method>(['POST', 'PUT', 'PATCH'])

let db: Db
let close: () => Promise<void>
let own: Ids
let strange: Ids
const callers = new Map<Role | 'nowhere', Caller>()

/** One of everything an address can name, in a studio. */
async function everything(studio: TestStudio): Promise<Ids> {
  const { world, id: studioId } = studio
  const at = new Date(Date.now() - 86_400_000)
  const ids: Ids = { class: world.classId, person: studio.idOf('dev'), lesson: world.lessonId, revision: world.revisionId, piece: await finishedPiece(world, at), photo: ulid(), signOff: await giveLevel(world, 'dev', 3, at), invitation: ulid(), letter: ulid(), note: ulid(), name: 'bend.jpg', judgement: ulid() }
  await judgePiece(db, world.who.ruth, ulid(), { ...await fairJudgement(world, ids.piece), id: ids.judgement }, at)
  await db.insert(photos).values({ studioId, id: ids.photo, pieceId: ids.piece, for: 'finished', claimedSha: sha256(ids.photo), state: 'awaited', bytes: 1, width: 1, height: 1 })
  await db.insert(tokens).values({ id: ids.invitation, kind: 'invite', hash: sha256(ids.invitation), studioId, emailKey: 'asked@bench.example', ends: new Date(Date.now() + 86_400_000), offer: { name: 'Asked', roles: ['apprentice'], ageBand: 'adult', classId: null, by: studio.idOf('owen') } })
  await db.insert(mail).values({ id: ids.letter, studioId, toPerson: ids.person, kind: 'judged', body: {}, state: 'given-up', nextAt: at, dedupeKey: ids.letter })
  const wordsId = ulid()
  await db.insert(words).values({ studioId, id: wordsId, salt: sha256(wordsId), text: 'Neck a little long.', by: studio.idOf('ruth'), at })
  await db.insert(notes).values({ studioId, id: ids.note, personId: ids.person, pieceId: ids.piece, wordsId, danger: false, at })
  const pictureId = ulid()
  await db.insert(pictures).values({ studioId, id: pictureId, sha: sha256(pictureId), kind: 'image/jpeg', bytes: 1, width: 1, height: 1 })
  await db.insert(revisionPictures).values({ studioId, revisionId: ids.revision, name: ids.name, pictureId, alt: 'A bend', mirror: 0 })
  return ids
}

/** A person who has come in and has no place in any studio. */
async function fromNowhere(): Promise<Caller> {
  const [id, email] = [ulid(), `nowhere.${ulid().toLowerCase()}@bench.example`]
  await db.insert(people).values({ id, email, emailKey: email, passwordHash: await passwordHash(), wants: {} })
  await db.insert(personNames).values({ personId: id, version: 1, name: 'No Where', fromAt: new Date() })
  return await asPerson(email)
}

beforeAll(async () => {
  ({ db, close } = openTest())
  await forgetAllTries(db)
  const [mine, theirs] = [await openStudio(db), await openStudio(db)]
  own = await everything(mine)
  strange = await everything(theirs)
  for (const role of ROLES) callers.set(role, await mine.as(WHO[role]))
  callers.set('nowhere', await fromNowhere())
})
afterAll(() => close())

const callerOf = (who: Role | 'nowhere'): Caller => {
  const caller = callers.get(who)
  if (!caller) throw new Error(`There is no ${who}.`)
  return caller
}

/** The address and method a file stands for. */
function requestOf(file: string): { method: Method, at: (ids: Ids) => string, parts: string[] } {
  const [, path = '', verb = ''] = /^(.*)\.(get|post|put|patch|delete)\.ts$/.exec(file) ?? []
  const method = METHODS[verb]
  if (!method) throw new Error(`${file} names no method.`)
  const parts = [...path.matchAll(/\[(\w+)\]/g)].map(([, part = '']) => part)
  const known = (ids: Ids): Map<string, string> => new Map(Object.entries(ids))
  return { method, parts, at: ids => `/api/${path.replace(/\/index$/, '').replace(/\[(\w+)\]/g, (whole, part: string) => known(ids).get(part) ?? whole)}` }
}

const mayAsk = ({ guard }: Line, role: Role): boolean => guard === 'open' || guard === 'person' || guard === 'member' || MAY[role].includes(guard)
const ask = (caller: Caller, file: string, line: Line, ids: Ids, body?: unknown) => {
  const { method, at } = requestOf(file)
  const sent = body ?? (BODIES.has(method) ? line.body?.(ids) : undefined)
  return caller.ask(method, `${at(ids)}${line.query ?? ''}`, sent, line.raw ? { raw: line.raw } : {})
}

describe('every route', () => {
  it('has a line in the table, and every line a route', () => {
    expect(Object.keys(ROUTES).sort()).toEqual(FILES)
  })
})

for (const [file, line] of Object.entries(ROUTES)) {
  const { method, parts } = requestOf(file)
  describe(file, () => {
    if (line.guard === 'open' && !line.body && !line.refused) {
      it('is open to anybody', async () => {
        expect((await ask(new Caller(), file, line, own)).status).toBe(200)
      })
    }
    if (line.guard !== 'open') {
      it('asks who it is', async () => {
        expect((await ask(new Caller(), file, line, own)).status).toBe(401)
      })
    }
    if (line.guard !== 'open' && line.guard !== 'person') {
      it('is closed to who has no place in the studio', async () => {
        expect((await ask(callerOf('nowhere'), file, line, own)).status).toBe(403)
      })
      for (const role of ROLES.filter(one => !mayAsk(line, one))) {
        it(`is closed to the ${role}`, async () => {
          expect((await ask(callerOf(role), file, line, own)).status).toBe(403)
        })
      }
    }
    for (const role of ROLES.filter(one => line.guard !== 'open' && mayAsk(line, one))) {
      if (parts.length > 0 && !line.elsewhere) {
        it(`shows the ${role} nothing of another studio`, async () => {
          expect((await ask(callerOf(role), file, line, strange)).status).toBe(404)
        })
      }
      for (const [i] of (line.strange ? [0, 1] : []).entries()) {
        it(`lets the ${role} name nothing of another studio (${i + 1})`, async () => {
          const body = line.strange?.(own, strange)[i] ?? line.strange?.(own, strange)[0]
          expect((await ask(callerOf(role), file, line, own, body)).status).toBe(404)
        })
      }
    }
    const { elsewhere } = line
    if (elsewhere) {
      it('answers for a thing of another studio as for one that is nowhere', async () => {
        const [theirs, nowhere] = await Promise.all([strange.piece, ulid()].map(piece => ask(callerOf(elsewhere.as), file, line, { ...own, piece }, elsewhere.body(own, piece))))
        expect([theirs?.status, nowhere?.status]).toEqual([elsewhere.status, elsewhere.status])
        const plain = (body: unknown) => JSON.stringify(body).replace(/[0-7][0-9A-HJKMNP-TV-Z]{25}/g, 'id')
        expect(plain(theirs?.body)).toBe(plain(nowhere?.body))
      })
    }
    const allowed = callersOf(line)
    for (const [body, fields] of line.refused ?? []) {
      it(`refuses ${JSON.stringify(body)} with a sentence at ${fields.join(', ')}`, async () => {
        const answer = await ask(allowed(), file, line, own, body)
        expect(answer.status).toBe(400)
        const { fieldErrors } = FieldErrorsSchema.parse(answer.body).data
        for (const field of fields) expect([field, fieldErrors[field]?.[0]]).toEqual([field, expect.stringMatching(/\.$/)])
      })
    }
    if (BODIES.has(method) && line.body) {
      it('refuses a field nobody asked for', async () => {
        const answer = await ask(allowed(), file, line, own, { ...line.body?.(own), studioOf: 'mine' })
        expect(answer.status).toBe(400)
        expect(FieldErrorsSchema.parse(answer.body).data.formErrors).toEqual(['Not asked for: studioOf.'])
      })
    }
  })
}

/** Someone whose request gets as far as the body. */
function callersOf(line: Line): () => Caller {
  const role = ROLES.find(one => mayAsk(line, one)) ?? 'manager'
  return () => callerOf(role)
}
