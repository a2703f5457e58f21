import { and, eq } from 'drizzle-orm'
import sharp from 'sharp'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { classLessons, drafts, pictures, revisions } from '#server/db/schema/lessons'
import { classes, classPeople } from '#server/db/schema/studio'
import { readDraft, saveDraft } from '#server/services/drafts'
import { importLesson } from '#server/services/import'
import { authorOf } from '#server/services/import-author'
import { addPicture, draftPicture, picturesBeside, revisionPicture, takeAwayPicture } from '#server/services/pictures'
import { type Desk, filesIn, GOOD, lessonWith, makeStudio, NOON, openDesk, refused, type Studio, use } from './authoring-world'

let desk: Desk
let studio: Studio
beforeAll(async () => { desk = await openDesk(); studio = await makeStudio(desk.db) })
afterAll(async () => { await desk.close() })

const photograph = (background: string) => sharp({ create: { width: 60, height: 40, channels: 3, background } }).jpeg().toBuffer()
const shows = (name: string) => GOOD.replace('READING long', `![Wire on the rule](${name} "mirror")\n\nREADING long`)
const rowsOf = (studioId: string) => desk.db.select({ id: pictures.id }).from(pictures).where(eq(pictures.studioId, studioId))
const SVG = Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 40 20"><script>alert(1)</script><path d="M0 0H9" onclick="alert(1)"/></svg>')

describe('pictures beside a lesson', () => {
  it('lie there by name; one file for the same bytes; a new one takes the name', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, shows('cut.jpg'))
    const red = await addPicture(desk.db, desk.files, studio.ruth, id, 'cut.jpg', await photograph('#a00'), NOON)
    const again = await addPicture(desk.db, desk.files, studio.ruth, id, 'again.jpg', await photograph('#a00'), NOON)
    expect(again.sha).toBe(red.sha)
    const blue = await addPicture(desk.db, desk.files, studio.ruth, id, 'cut.jpg', await photograph('#00a'), NOON)
    expect((await picturesBeside(desk.db, studio.studioId, id)).map(({ name, sha }) => [name, sha])).toEqual([['again.jpg', red.sha], ['cut.jpg', blue.sha]])
    expect((await draftPicture(desk.db, desk.files, studio.studioId, id, 'cut.jpg')).sha).toBe(blue.sha)
    await takeAwayPicture(desk.db, studio.ruth, id, 'again.jpg')
    expect(await refused(draftPicture(desk.db, desk.files, studio.studioId, id, 'again.jpg'))).toMatchObject({ status: 404 })
  })

  it('stay with a revision when another takes their name, and make another revision', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, shows('cut.jpg'), 'Stays')
    expect(await refused(use(desk.db, studio.ruth, id))).toMatchObject({ status: 422, data: { findings: expect.arrayContaining([expect.objectContaining({ code: 'picture-missing' })]) } })
    const red = await addPicture(desk.db, desk.files, studio.ruth, id, 'cut.jpg', await photograph('#a00'), NOON)
    const first = await use(desk.db, studio.ruth, id)
    const blue = await addPicture(desk.db, desk.files, studio.ruth, id, 'cut.jpg', await photograph('#00a'), NOON)
    const second = await use(desk.db, studio.ruth, id)
    expect([first.number, second.number]).toEqual([1, 2])
    expect((await revisionPicture(desk.db, desk.files, studio.ruth, first.id, 'cut.jpg')).sha).toBe(red.sha)
    expect((await revisionPicture(desk.db, desk.files, studio.ruth, second.id, 'cut.jpg')).sha).toBe(blue.sha)
  })

  it('are seen by those the lesson is taught to and by nobody else', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, shows('cut.jpg'), 'Taught')
    await addPicture(desk.db, desk.files, studio.ruth, id, 'cut.jpg', await photograph('#a00'), NOON)
    const revision = await use(desk.db, studio.ruth, id)
    const seenBy = (who: typeof studio.amy) => revisionPicture(desk.db, desk.files, who, revision.id, 'cut.jpg')
    expect(await refused(seenBy(studio.amy))).toMatchObject({ status: 404 })
    const classId = ulid()
    const { studioId } = studio
    await desk.db.insert(classes).values({ studioId, id: classId, name: 'Tuesday', termFrom: '2026-01-01', termTo: '2026-12-31', weekday: 2 })
    await desk.db.insert(classPeople).values({ studioId, classId, personId: studio.amy.personId, fromOn: '2026-01-01' })
    await desk.db.insert(classLessons).values({ studioId, id: ulid(), classId, lessonId: id, place: 1 })
    expect((await seenBy(studio.amy)).kind).toBe('image/webp')
    expect(await refused(seenBy((await makeStudio(desk.db)).ruth))).toMatchObject({ status: 404 })
  })

  it('that are none leave nothing behind: no file, no row', async () => {
    const other = await makeStudio(desk.db)
    const { id } = await lessonWith(desk.db, other.ruth, GOOD)
    const before = await filesIn(desk.folder)
    const bad: [string, Buffer, number][] = [
      ['cut.jpg', SVG, 422], ['cut.jpg', (await photograph('#a00')).subarray(0, 120), 422], ['cut.jpg', Buffer.from('GIF89a not at all'), 422], ['cut.jpg', Buffer.alloc(32_000_001), 413],
      ['../cut.jpg', await photograph('#111'), 400], ['a/b.jpg', await photograph('#222'), 400], ['Cut.jpg', await photograph('#333'), 400],
    ]
    for (const [name, bytes, status] of bad) {
      const refusal = await refused(addPicture(desk.db, desk.files, other.ruth, id, name, bytes, NOON))
      expect([name, refusal.status]).toEqual([name, status])
      expect(refusal.says.length).toBeGreaterThan(10)
    }
    expect(await picturesBeside(desk.db, other.studioId, id)).toEqual([])
    expect(await rowsOf(other.studioId)).toEqual([])
    expect(await filesIn(desk.folder)).toEqual(before)
  })

  it('of another studio’s lesson are not there', async () => {
    const { id } = await lessonWith(desk.db, studio.ruth, shows('cut.jpg'), 'Foreign')
    await addPicture(desk.db, desk.files, studio.ruth, id, 'cut.jpg', await photograph('#a00'), NOON)
    const { ruth: other } = await makeStudio(desk.db)
    const bytes = await photograph('#0a0')
    expect(await refused(addPicture(desk.db, desk.files, other, id, 'cut.jpg', bytes, NOON))).toMatchObject({ status: 404 })
    expect(await refused(draftPicture(desk.db, desk.files, other.studioId, id, 'cut.jpg'))).toMatchObject({ status: 404 })
    expect(await refused(takeAwayPicture(desk.db, other, id, 'cut.jpg'))).toMatchObject({ status: 404 })
  })
})

describe('a lesson that comes by import', () => {
  it('keeps its text to the byte and its drawings without what is hostile', async () => {
    const source = `\uFEFF${shows('cut.svg')}\r\n`
    const { ruth } = await makeStudio(desk.db)
    const taken = await importLesson(desk.db, ruth, { slug: 'cut-to-length', source, pictures: new Map([['cut.svg', SVG]]) }, NOON, desk.files)
    const [row] = await desk.db.select({ source: drafts.source }).from(drafts).where(and(eq(drafts.studioId, ruth.studioId), eq(drafts.lessonId, taken.lessonId)))
    expect(row?.source).toBe(source)
    const kept = await draftPicture(desk.db, desk.files, ruth.studioId, 'cut-to-length', 'cut.svg')
    expect(kept.kind).toBe('image/svg+xml')
    expect(kept.bytes.toString()).toContain('M0 0H9')
    expect(kept.bytes.toString()).not.toMatch(/script|onclick|alert/)
  })

  it('comes again as a new draft of the same lesson, and is not kept at all with a bad picture', async () => {
    const { ruth } = await makeStudio(desk.db)
    const first = await importLesson(desk.db, ruth, { slug: 'cut', source: GOOD, pictures: new Map() }, NOON, desk.files)
    await use(desk.db, ruth, first.lessonId)
    const again = await importLesson(desk.db, ruth, { slug: 'cut', source: `${GOOD}\nMore.\n`, pictures: new Map() }, NOON, desk.files)
    expect(again).toMatchObject({ lessonId: first.lessonId, isNew: false })
    expect(await desk.db.select({ id: revisions.id }).from(revisions).where(eq(revisions.studioId, ruth.studioId))).toHaveLength(1)
    const bad = importLesson(desk.db, ruth, { slug: 'bad', source: GOOD, pictures: new Map([['cut.svg', Buffer.from('<svg><script>alert(1)</script></svg>')]]) }, NOON, desk.files)
    expect(await refused(bad)).toMatchObject({ status: 422 })
    expect(await refused(readDraft(desk.db, ruth, 'bad'))).toMatchObject({ status: 404 })
  })

  it('is taken in by an instructor of the studio and by no one else', async () => {
    const { studioId, ruth, amy } = await makeStudio(desk.db)
    const slug = `writing-${studioId.toLowerCase()}`
    expect((await authorOf(desk.db, slug)).personId).toBe(ruth.personId)
    expect(await refused(authorOf(desk.db, slug, 'amy@nowhere.invalid'))).toMatchObject({ status: 403 })
    expect(await refused(authorOf(desk.db, 'no-such-studio'))).toMatchObject({ status: 404 })
    expect(amy.personId).not.toBe(ruth.personId)
  })

  it('with hostile text holds none of it anywhere in what is kept', async () => {
    const { ruth } = await makeStudio(desk.db)
    const { id, etag } = await lessonWith(desk.db, ruth, GOOD)
    await saveDraft(desk.db, ruth, id, { etag, source: GOOD.replace('A length of wire.', 'A <img src=x onerror=alert(1)> [go](javascript:alert(1)).') }, NOON)
    expect(await refused(use(desk.db, ruth, id))).toMatchObject({ status: 422, data: { findings: expect.arrayContaining([expect.objectContaining({ code: 'raw-html' }), expect.objectContaining({ code: 'unsafe-link' })]) } })
  })
})
