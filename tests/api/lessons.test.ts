import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { register } from '#server/db/schema/judging'
import { lessons, revisionActs, revisions } from '#server/db/schema/lessons'
import { readDraft, saveDraft } from '#server/services/drafts'
import { putIntoUse, useView } from '#server/services/into-use'
import { listLessons, makeLesson, putAway } from '#server/services/lessons'
import { verify } from '#server/services/register'
import { backInUse, currentRevision, lessonView, revisionById, withdraw } from '#server/services/revisions'
import { shaOf } from '#shared/lesson/canonical'
import { type Desk, GOOD, later, lessonWith, makeStudio, NOON, openDesk, refused, type Studio, use } from './authoring-world'

let desk: Desk
let studio: Studio
beforeAll(async () => { desk = await openDesk() })
afterAll(async () => { await desk.close() })
const begin = async () => { studio = await makeStudio(desk.db) }
const acts = async (revisionId: string) => (await desk.db.select({ act: revisionActs.act }).from(revisionActs).where(and(eq(revisionActs.studioId, studio.studioId), eq(revisionActs.revisionId, revisionId)))).map(row => row.act)
const registered = async () => (await desk.db.select({ act: register.act }).from(register).where(eq(register.studioId, studio.studioId))).map(row => row.act)

describe('a new lesson', () => {
  beforeAll(begin)

  it('is one however often it is pressed, and two of one title have two addresses', async () => {
    const body = { id: ulid(), title: 'Jump rings', craft: 'wire' as const }
    const made = await Promise.all([makeLesson(desk.db, studio.ruth, body, NOON), makeLesson(desk.db, studio.ruth, body, NOON), makeLesson(desk.db, studio.imran, { ...body, id: ulid() }, NOON)])
    expect(made[0]).toEqual(made[1])
    expect(new Set(made.map(lesson => lesson.slug))).toEqual(new Set(['jump-rings', 'jump-rings-2']))
    expect((await listLessons(desk.db, studio.studioId)).map(({ title, stage, author }) => ({ title, stage, author })))
      .toEqual(expect.arrayContaining([{ title: 'Jump rings', stage: 'draft', author: 'Ruth Calder' }, { title: 'Jump rings', stage: 'draft', author: 'Imran Sethi' }]))
  })
})

describe('a draft', () => {
  beforeAll(begin)

  it('is kept half-written, to the byte', async () => {
    const source = '---\ntitle: Half\u00A0a lesson \r\n\n## HOLD: nonsense {\u{1F600}'
    const { id } = await lessonWith(desk.db, studio.ruth, source)
    expect((await readDraft(desk.db, studio.ruth, id)).source).toBe(source)
  })

  it('kept by another meanwhile is not written over: who, when and the other text come back', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, 'As it was.')
    const theirs = await saveDraft(desk.db, studio.imran, id, { etag, source: 'By Imran.' }, later(1))
    expect(await refused(saveDraft(desk.db, studio.ruth, id, { etag, source: 'By Ruth.' }, later(2)))).toEqual({
      status: 409, says: expect.stringContaining('Imran Sethi kept another text'),
      data: { by: 'Imran Sethi', isMine: false, at: later(1).toISOString(), source: 'By Imran.', etag: theirs.etag },
    })
    expect((await readDraft(desk.db, studio.ruth, id)).source).toBe('By Imran.')
    expect((await saveDraft(desk.db, studio.ruth, id, { etag: theirs.etag, source: 'By Ruth.' }, later(3))).savedAt).toBe(later(3).toISOString())
  })

  it('sent again is the same, also when the answer was lost and on two lines at once', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, 'As it was.')
    const twice = await Promise.all([1, 2].map(() => saveDraft(desk.db, studio.ruth, id, { etag, source: 'Once.' }, NOON)))
    expect(twice[0]).toEqual(twice[1])
  })

  it('tells large letters from small ones', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, GOOD)
    await use(desk.db, studio.ruth, id)
    const { etag: after } = await readDraft(desk.db, studio.ruth, id)
    expect((await listLessons(desk.db, studio.studioId)).find(lesson => lesson.id === id)?.draft).toBeNull()
    expect(etag).not.toBe(after)
    await saveDraft(desk.db, studio.ruth, id, { etag: after, source: (await readDraft(desk.db, studio.ruth, id)).source.replace('A length of wire.', 'A Length of wire.') }, later(1))
    expect((await listLessons(desk.db, studio.studioId)).find(lesson => lesson.id === id)?.draft).toEqual({ savedAt: later(1).toISOString() })
  })
})

describe('putting into use', () => {
  beforeAll(begin)

  it('is refused with the findings where there are errors, and leaves nothing behind', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, GOOD.replace('{cut}', '{cutt}'))
    const refusal = await refused(putIntoUse(desk.db, studio.ruth, id, { id: ulid(), etag, effect: 'first', note: '' }, NOON))
    expect(refusal).toMatchObject({ status: 422, says: 'One error keeps this lesson from use. Mend it first.', data: { findings: [{ code: 'unknown-figure', severity: 'error', line: 31 }] } })
    expect(await currentRevision(desk.db, studio.studioId, id)).toBeNull()
    expect(await registered()).toEqual([])
  })

  it('makes one revision of a double press, writes the keys in and says so in the register', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, GOOD)
    const body = { id: ulid(), etag, effect: 'first' as const, note: '' }
    const pressed = await Promise.all([1, 2, 3].map(() => putIntoUse(desk.db, studio.ruth, id, body, NOON)))
    expect(pressed.map(one => one.revision)).toEqual(Array(3).fill({ id: body.id, number: 1 }))
    expect(pressed.filter(one => !one.same)).toHaveLength(1)
    const kept = await revisionById(desk.db, studio.studioId, body.id)
    expect(kept.source).toBe(GOOD.replace('## Cut it\n', '## Cut it\nkey: cut-it\n'))
    expect((await readDraft(desk.db, studio.ruth, id)).source).toBe(kept.source)
    expect(typeof kept.compiled).toBe('object')
    expect(shaOf(kept.compiled)).toBe(kept.compiledSha)
    expect(kept.source.slice(kept.compiled.parts[0]?.steps[0]?.range.from).startsWith('## Cut it')).toBe(true)
    expect(await acts(body.id)).toEqual(['into-use'])
    expect(await registered()).toEqual(['revision-into-use'])
  })

  it('of the same text, from two pages, is the same revision', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, GOOD, 'Two pages')
    const put = (who = studio.ruth) => putIntoUse(desk.db, who, id, { id: ulid(), etag, effect: 'first', note: '' }, NOON)
    const both = await Promise.all([put(), put(studio.imran)])
    expect(both[0]?.revision).toEqual(both[1]?.revision)
    expect(await desk.db.select({ id: revisions.id }).from(revisions).where(and(eq(revisions.studioId, studio.studioId), eq(revisions.lessonId, id)))).toHaveLength(1)
  })

  it('is refused where the text is no longer the one that was shown', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, GOOD, 'Changed')
    await saveDraft(desk.db, studio.imran, id, { etag, source: GOOD.replace('Round wire', 'Square wire') }, NOON)
    expect(await refused(putIntoUse(desk.db, studio.ruth, id, { id: ulid(), etag, effect: 'first', note: '' }, NOON))).toMatchObject({ status: 409, says: expect.stringContaining('changed since this page opened') })
  })

  it('numbers on, asks what changed, and keeps a step whose title changed', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, GOOD, 'Numbers')
    const first = await use(desk.db, studio.ruth, id)
    const draft = await readDraft(desk.db, studio.ruth, id)
    const { etag } = await saveDraft(desk.db, studio.ruth, id, { etag: draft.etag, source: draft.source.replace('## Cut it\n', '## Cut the wire\n') }, NOON)
    expect(await useView(desk.db, studio.studioId, id)).toMatchObject({ number: 2, effect: 'words', keys: [], same: null })
    const body = { id: ulid(), etag, effect: 'words' as const, note: '' }
    expect(await refused(putIntoUse(desk.db, studio.ruth, id, body, NOON))).toMatchObject({ status: 422, data: { fieldErrors: { note: [expect.any(String)] } } })
    expect(await refused(putIntoUse(desk.db, studio.ruth, id, { ...body, effect: 'first', note: 'x' }, NOON))).toMatchObject({ status: 422 })
    await putIntoUse(desk.db, studio.ruth, id, { ...body, note: 'Says what is cut.' }, later(1))
    const now = await currentRevision(desk.db, studio.studioId, id)
    expect(now).toMatchObject({ number: 2, effect: 'words', note: 'Says what is cut.' })
    expect(now?.compiled.parts[0]?.steps[0]?.key).toBe('cut-it')
    expect((await revisionById(desk.db, studio.studioId, first.id)).compiled.parts[0]?.steps[0]?.title).toEqual([{ t: 'text', v: 'Cut it' }])
  })

  it('of an earlier revision’s text makes none: that revision is put back in use', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, GOOD, 'Back')
    const first = await use(desk.db, studio.ruth, id)
    const one = await readDraft(desk.db, studio.ruth, id)
    const two = await saveDraft(desk.db, studio.ruth, id, { etag: one.etag, source: one.source.replace('Round wire', 'Wire') }, NOON)
    await use(desk.db, studio.ruth, id)
    await saveDraft(desk.db, studio.ruth, id, { etag: two.etag, source: one.source }, later(1))
    expect(await useView(desk.db, studio.studioId, id)).toMatchObject({ same: { id: first.id, number: 1, inUse: false } })
    expect(await refused(use(desk.db, studio.ruth, id))).toMatchObject({ status: 409, says: expect.stringContaining('revision 1 to the letter') })
    const act = { id: ulid(), revision: first.id }
    await backInUse(desk.db, studio.ruth, ulid(), id, act, later(2))
    await backInUse(desk.db, studio.ruth, ulid(), id, act, later(2))
    expect(await currentRevision(desk.db, studio.studioId, id)).toMatchObject({ number: 1 })
    expect(await acts(first.id)).toEqual(['into-use', 'back-in-use'])
    expect(await verify(desk.db, studio.studioId)).toMatchObject({ broken: null })
  })
})

describe('withdrawing', () => {
  beforeAll(begin)

  it('leaves the revision, ends its use, and is done once', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, GOOD)
    const revision = await use(desk.db, studio.ruth, id)
    expect(await refused(putAway(desk.db, studio.ruth, id, true, NOON))).toMatchObject({ status: 409 })
    const act = { id: ulid(), revision: revision.id, danger: false }
    await Promise.all([1, 2].map(() => withdraw(desk.db, studio.ruth, ulid(), id, act, later(1))))
    expect(await currentRevision(desk.db, studio.studioId, id)).toBeNull()
    expect(await refused(withdraw(desk.db, studio.ruth, ulid(), id, { ...act, id: ulid() }, later(2)))).toMatchObject({ status: 409 })
    await withdraw(desk.db, studio.ruth, ulid(), id, { ...act, id: ulid(), danger: true }, later(3))
    expect(await acts(revision.id)).toEqual(['into-use', 'withdrawn', 'withdrawn-danger'])
    expect(await registered()).toEqual(['revision-into-use', 'revision-withdrawn', 'revision-withdrawn-danger'])
    expect((await lessonView(desk.db, studio.studioId, id)).lesson.stage).toBe('withdrawn')
    expect(await putAway(desk.db, studio.ruth, id, true, later(4))).toEqual({ stage: 'put-away' })
    expect(await refused(backInUse(desk.db, studio.ruth, ulid(), id, { id: ulid(), revision: revision.id }, later(5)))).toMatchObject({ status: 409, says: expect.stringContaining('put away') })
  })
})

describe('another studio’s lesson', () => {
  beforeAll(begin)

  it('is not there, by its id or its address, for anything', async () => {
    const { id, etag } = await lessonWith(desk.db, studio.ruth, GOOD)
    const revision = await use(desk.db, studio.ruth, id)
    const [{ slug } = { slug: '' }] = await desk.db.select({ slug: lessons.slug }).from(lessons).where(and(eq(lessons.studioId, studio.studioId), eq(lessons.id, id)))
    const { ruth: other } = await makeStudio(desk.db)
    const own = await lessonWith(desk.db, other, GOOD)
    await use(desk.db, other, own.id)
    // The other studio has a lesson of the same address; it must only ever meet its own.
    expect((await lessonView(desk.db, other.studioId, slug)).lesson.id).toBe(own.id)
    const foreign = { id: ulid(), revision: revision.id }
    const tries = [
      readDraft(desk.db, other, id), saveDraft(desk.db, other, id, { etag, source: 'x' }, NOON), useView(desk.db, other.studioId, id), lessonView(desk.db, other.studioId, id), putAway(desk.db, other, id, true, NOON),
      putIntoUse(desk.db, other, id, { id: ulid(), etag, effect: 'first', note: '' }, NOON), withdraw(desk.db, other, ulid(), id, { ...foreign, danger: false }, NOON), backInUse(desk.db, other, ulid(), id, foreign, NOON),
      // A revision of another studio, or of another lesson, named under a lesson of one's own.
      withdraw(desk.db, other, ulid(), own.id, { ...foreign, danger: true }, NOON), backInUse(desk.db, other, ulid(), own.id, foreign, NOON),
      revisionById(desk.db, other.studioId, revision.id), currentRevision(desk.db, other.studioId, id),
    ]
    for (const refusal of await Promise.all(tries.map(refused))) expect(refusal.status).toBe(404)
    expect(await acts(revision.id)).toEqual(['into-use'])
  })
})
