import sharp from 'sharp'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import type { Db } from '#server/db/client'
import { GOOD, makeStudio, lessonWith, use } from './authoring-world'
import { type Caller, FieldErrorsSchema, type Method, openStudio, openTest, saysOf, type TestStudio } from './harness'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
let ruth: Caller
beforeAll(async () => {
  ({ db, close } = openTest())
  studio = await openStudio(db)
  ruth = await studio.as('ruth')
})
afterAll(() => close())

const MadeSchema = z.object({ id: z.string(), slug: z.string() })
const DraftSchema = z.object({ source: z.string(), etag: z.string(), reader: z.string(), pictures: z.array(z.object({ name: z.string(), sha: z.string() })) })
const PutSchema = z.object({ revision: z.object({ id: z.string(), number: z.number() }), same: z.boolean(), etag: z.string() })
const ViewSchema = z.object({ currentRevision: z.string().nullable(), lesson: z.object({ stage: z.string() }), revisions: z.array(z.object({ number: z.number(), acts: z.array(z.object({ act: z.string(), by: z.string() })) })) })

const make = async (title = 'Cut to length') => MadeSchema.parse((await ruth.post('/api/lessons', { id: ulid(), title, craft: 'wire' })).body)
const draft = async (lesson: string) => DraftSchema.parse((await ruth.get(`/api/lessons/${lesson}/draft`)).body)
/** A lesson whose draft is the given text, and the etag of it. */
async function written(source = GOOD): Promise<{ id: string, slug: string, etag: string }> {
  const made = await make()
  const { body } = await ruth.ask('PUT', `/api/lessons/${made.id}/draft`, { etag: (await draft(made.id)).etag, source })
  return { ...made, ...z.object({ etag: z.string() }).parse(body) }
}
const photograph = async (background = '#a07030') => new Uint8Array(await sharp({ create: { width: 80, height: 60, channels: 3, background } }).jpeg().toBuffer())
const send = (caller: Caller, lesson: string, name: string, bytes: Uint8Array<ArrayBuffer>, type = 'image/jpeg') => caller.ask('POST', `/api/lessons/${lesson}/pictures?name=${encodeURIComponent(name)}`, undefined, { raw: { type, bytes } })

describe('a lesson from the first letter to its use', () => {
  it('is made, written, put into use once, withdrawn and back, by its address or its id', async () => {
    const body = { id: ulid(), title: 'Jump rings, by hand', craft: 'wire' }
    const [first, second] = await Promise.all([ruth.post('/api/lessons', body), ruth.post('/api/lessons', body)])
    expect([first.status, second.status]).toEqual([201, 201])
    expect(first.body).toEqual(second.body)
    const { id, slug } = MadeSchema.parse(first.body)
    const begun = await draft(slug)
    expect(begun).toMatchObject({ reader: studio.idOf('ruth') })
    expect((await ruth.ask('PUT', `/api/lessons/${slug}/draft`, { etag: begun.etag, source: GOOD })).status).toBe(200)
    const { etag } = await draft(id)
    const use = { id: ulid(), etag, effect: 'first', note: '' }
    const pressed = await Promise.all([1, 2].map(() => ruth.post(`/api/lessons/${slug}/use`, use)))
    expect(pressed.map(answer => answer.status).sort()).toEqual([200, 201])
    expect(pressed.map(answer => PutSchema.parse(answer.body).revision)).toEqual([{ id: use.id, number: 1 }, { id: use.id, number: 1 }])
    expect((await ruth.post(`/api/lessons/${id}/withdraw`, { id: ulid(), revision: use.id, danger: true })).body).toEqual({ withdrawn: true })
    expect(ViewSchema.parse((await ruth.get(`/api/lessons/${slug}`)).body)).toMatchObject({ currentRevision: null, lesson: { stage: 'withdrawn' } })
    expect((await ruth.post(`/api/lessons/${id}/back-in-use`, { id: ulid(), revision: use.id })).body).toEqual({ inUse: true })
    expect(ViewSchema.parse((await ruth.get(`/api/lessons/${slug}?number=1`)).body)).toMatchObject({
      currentRevision: use.id, revisions: [{ number: 1, acts: [{ act: 'into-use', by: 'Ruth Calder' }, { act: 'withdrawn-danger', by: 'Ruth Calder' }, { act: 'back-in-use', by: 'Ruth Calder' }] }],
    })
    expect((await ruth.get(`/api/lessons/${slug}?number=2`)).status).toBe(404)
  })

  it('with errors is not put into use: 422 and the findings', async () => {
    const { id, etag } = await written(GOOD.replace('{cut}', '{cutt}'))
    const answer = await ruth.post(`/api/lessons/${id}/use`, { id: ulid(), etag, effect: 'first', note: '' })
    expect(answer.status).toBe(422)
    expect(answer.body).toMatchObject({ message: 'One error keeps this lesson from use. Mend it first.', data: { findings: [{ code: 'unknown-figure', line: 31 }] } })
    expect((await ruth.get(`/api/lessons/${id}/use`)).body).toMatchObject({ number: 1, findings: [{ code: 'unknown-figure' }], keys: [{ key: 'cut-it', title: 'Cut it' }] })
  })

  it('kept by another meanwhile: 409 with who, when and the other text', async () => {
    const { id, etag } = await written()
    const imran = await studio.as('imran')
    expect((await imran.ask('PUT', `/api/lessons/${id}/draft`, { etag, source: 'By Imran.' })).status).toBe(200)
    const answer = await ruth.ask('PUT', `/api/lessons/${id}/draft`, { etag, source: 'By Ruth.' })
    expect(answer.status).toBe(409)
    expect(answer.body).toMatchObject({ data: { by: 'Imran Sethi', isMine: false, source: 'By Imran.', at: expect.stringMatching(/^\d{4}-/) } })
  })

  it('is kept whole when it is long, and refused with a sentence when it is far too long', async () => {
    const { id, etag } = await written()
    const long = 'ö\n'.repeat(400_000)
    const kept = await ruth.ask('PUT', `/api/lessons/${id}/draft`, { etag, source: long })
    expect(kept.status).toBe(200)
    expect((await draft(id)).source).toBe(long)
    const longer = await ruth.ask('PUT', `/api/lessons/${id}/draft`, { etag: z.object({ etag: z.string() }).parse(kept.body).etag, source: 'a'.repeat(1_000_001) })
    expect(longer.status).toBe(400)
    expect(FieldErrorsSchema.parse(longer.body).data.fieldErrors.source?.[0]).toContain('longer than a lesson can be')
  })

  it('asks for a title and a craft in words', async () => {
    const answer = await ruth.post('/api/lessons', { id: ulid(), title: ' ', craft: 'pottery' })
    expect(answer.status).toBe(400)
    expect(FieldErrorsSchema.parse(answer.body).data.fieldErrors).toMatchObject({ title: [expect.stringContaining('title'), expect.any(String)], craft: ['Choose the craft.'] })
  })
})

describe('pictures of a lesson', () => {
  it('come as bytes, are served under a policy of their own, and are for ever under their revision', async () => {
    const { id, etag } = await written(GOOD.replace('READING long', '![Wire on the rule](cut.jpg "mirror")\n\nREADING long'))
    const sent = await send(ruth, id, 'cut.jpg', await photograph())
    expect([sent.status, sent.body]).toEqual([201, expect.objectContaining({ name: 'cut.jpg', width: 80, height: 60 })])
    const beside = await ruth.get(`/api/lessons/${id}/pictures/cut.jpg`)
    expect(beside.headers.get('cache-control')).toBe('private, no-cache')
    const put = PutSchema.parse((await ruth.post(`/api/lessons/${id}/use`, { id: ulid(), etag, effect: 'first', note: '' })).body)
    const path = `/api/pictures/${put.revision.id}/cut.jpg`
    const { status, headers } = await ruth.get(path)
    expect([status, headers.get('content-type'), headers.get('content-security-policy'), headers.get('x-content-type-options'), headers.get('cache-control')])
      .toEqual([200, 'image/webp', 'default-src \'none\'; style-src \'unsafe-inline\'; sandbox', 'nosniff', 'private, max-age=31536000, immutable'])
    expect((await ruth.ask('GET', path, undefined, { headers: { 'if-none-match': headers.get('etag') ?? '' } })).status).toBe(304)
    expect((await (await studio.as('amy')).get(path)).status).toBe(404)
    const taken = await ruth.ask('DELETE', `/api/lessons/${id}/pictures/cut.jpg`)
    expect(taken.status).toBe(200)
    expect((await ruth.get(path)).status).toBe(200)
  })

  it('that are none are refused with a sentence, and nothing lies beside the lesson', async () => {
    const { id } = await written()
    const whole = await photograph()
    const svg = new TextEncoder().encode('<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>')
    const answers = [
      await send(ruth, id, 'cut.svg', svg, 'image/svg+xml'), await send(ruth, id, 'cut.jpg', whole.slice(0, whole.length >> 1)), await send(ruth, id, 'cut.jpg', new Uint8Array(0)),
      await send(ruth, id, '../cut.jpg', whole), await send(ruth, id, 'a/b.jpg', whole), await send(ruth, id, 'cut.jpg', new Uint8Array(33_000_000)), await send(ruth, id, 'cut.jpg', new TextEncoder().encode('text'), 'text/plain'),
    ]
    expect(answers.map(answer => answer.status)).toEqual([422, 422, 400, 400, 400, 413, 415])
    for (const answer of answers) expect(saysOf(answer).length).toBeGreaterThan(10)
    expect((await draft(id)).pictures).toEqual([])
  })

  it('larger than 4 MB and smaller than 32 are taken', async () => {
    const { id } = await written()
    const side = 1700
    const noise = await sharp(Buffer.from(Array.from({ length: side * side * 3 }, (_, n) => (n * 2_654_435_761 >>> 13) & 255)), { raw: { width: side, height: side, channels: 3 } }).png({ compressionLevel: 0 }).toBuffer()
    expect(noise.length).toBeGreaterThan(4_100_000)
    expect((await send(ruth, id, 'noise.png', new Uint8Array(noise), 'image/png')).status).toBe(201)
  })
})

describe('who may do what with lessons', () => {
  const routes: [Method, string, unknown][] = [
    ['GET', '/api/lessons', undefined], ['POST', '/api/lessons', { id: ulid(), title: 'A lesson', craft: 'wire' }], ['GET', '/api/lessons/ID', undefined], ['GET', '/api/lessons/ID/draft', undefined],
    ['PUT', '/api/lessons/ID/draft', { etag: ulid(), source: 'x' }], ['GET', '/api/lessons/ID/use', undefined], ['POST', '/api/lessons/ID/use', { id: ulid(), etag: ulid(), effect: 'words', note: 'x' }],
    ['POST', '/api/lessons/ID/withdraw', { id: ulid(), revision: 'REVISION', danger: false }], ['POST', '/api/lessons/ID/back-in-use', { id: ulid(), revision: 'REVISION' }],
    ['POST', '/api/lessons/ID/put-away', { away: true }], ['GET', '/api/lessons/ID/pictures', undefined], ['GET', '/api/lessons/ID/pictures/cut.jpg', undefined], ['DELETE', '/api/lessons/ID/pictures/cut.jpg', undefined],
  ]
  const SEEN_BY_MANAGER = new Set(['GET /api/lessons', 'GET /api/lessons/ID', 'GET /api/lessons/ID/pictures/cut.jpg'])
  const asked = (caller: Caller, [method, path, body]: [Method, string, unknown], ids: { id: string, revision: string }) =>
    caller.ask(method, path.replace('ID', ids.id), body === undefined ? undefined : JSON.parse(JSON.stringify(body).replace('REVISION', ids.revision)))

  it('apprentices and assessors nothing, managers only look, nobody from outside anything', async () => {
    const { id } = await lessonWith(db, studio.world.who.ruth, GOOD)
    const revision = await use(db, studio.world.who.ruth, id)
    const ids = { id, revision: revision.id }
    const [amy, marian, owen] = [await studio.as('amy'), await studio.as('marian'), await studio.as('owen')]
    for (const route of routes) {
      const name = `${route[0]} ${route[1]}`
      expect([name, (await asked(amy, route, ids)).status]).toEqual([name, 403])
      expect([name, (await asked(marian, route, ids)).status]).toEqual([name, 403])
      if (!SEEN_BY_MANAGER.has(name)) expect([name, (await asked(owen, route, ids)).status]).toEqual([name, 403])
    }
    expect((await owen.get('/api/lessons')).status).toBe(200)
    expect((await owen.get(`/api/lessons/${id}`)).status).toBe(200)
  })

  it('another studio’s lesson is not there', async () => {
    const far = await makeStudio(db)
    const { id } = await lessonWith(db, far.ruth, GOOD)
    const revision = await use(db, far.ruth, id)
    for (const route of routes.filter(([, path]) => path.includes('ID'))) {
      const name = `${route[0]} ${route[1]}`
      expect([name, (await asked(ruth, route, { id, revision: revision.id })).status]).toEqual([name, 404])
    }
    expect((await send(ruth, id, 'cut.jpg', await photograph())).status).toBe(404)
    expect((await ruth.get(`/api/pictures/${revision.id}/cut.jpg`)).status).toBe(404)
    expect(z.array(z.object({ id: z.string() })).parse((await ruth.get('/api/lessons')).body).map(lesson => lesson.id)).not.toContain(id)
  })
})
