import { and, eq, max } from 'drizzle-orm'
import { shaOf, sha256 } from '../../shared/lesson/canonical'
import { compile, errorsOf } from '../../shared/lesson/compile'
import { effectOf } from '../../shared/lesson/effect'
import { keyEdits, writeKeys, type KeyEdit } from '../../shared/lesson/keys'
import { picturesOf, type PictureUse } from '../../shared/lesson/pictures'
import { COMPILER, FIGURE_ENGINE, type Finding, type Lesson } from '../../shared/lesson/schema'
import type { UseBody } from '../../shared/schemas/lessons'
import type { DraftPicture, UseView } from '../../shared/types/lessons'
import type { Db, DbOrTx, Tx } from '../db/client'
import { inTransaction } from '../db/transaction'
import { drafts, draftPictures, lessons, revisionPictures, revisions } from '../db/schema/lessons'
import type { Actor } from './actor'
import { draftOf, lastRevision } from './drafts'
import { lessonOf, slugsOf, type LessonRecord } from './lessons'
import { picturesBeside } from './pictures'
import { found, refuse } from './refuse'
import { recordAct, setCurrent } from './revisions'

/** A draft compiled as it would be kept, with the keys written in. */
interface Tried { source: string, etag: string, lesson: Lesson, findings: Finding[], keys: KeyEdit[], uses: PictureUse[], shas: Map<string, string>, previous: Lesson | null }

async function tryDraft(db: DbOrTx, studioId: string, lessonId: string): Promise<Tried> {
  const draft = await draftOf(db, studioId, lessonId)
  const beside = await picturesBeside(db, studioId, lessonId)
  const previous = (await lastRevision(db, studioId, lessonId))?.compiled ?? null
  const options = { pictures: new Set(beside.map(picture => picture.name)), lessons: new Set(await slugsOf(db, studioId)), previous }
  const first = compile(draft.source, options)
  const keys = keyEdits(draft.source, first.lesson)
  const source = writeKeys(draft.source, keys)
  // Compiled again with its keys: the ranges kept with a revision are those of the source kept with it.
  const { lesson, findings } = keys.length > 0 ? compile(source, options) : first
  return { source, etag: draft.etag, lesson, findings: keys.length > 0 ? first.findings : findings, keys, uses: picturesOf(lesson), shas: shasOf(beside), previous }
}

const shasOf = (beside: readonly DraftPicture[]) => new Map(beside.map(({ name, sha }) => [name, sha]))

/** Over the source and its pictures, by name; not over the compiled value, which a later compiler would make otherwise. */
function sourceShaOf({ source, uses, shas }: Pick<Tried, 'source' | 'uses' | 'shas'>): string {
  const shown = uses.map(({ name }) => `${name} ${shas.get(name) ?? ''}`).sort()
  return sha256([sha256(source), ...shown].join('\n'))
}

/** What putting the draft into use would do, for the page that asks for the word. */
export async function useView(db: Db, studioId: string, address: string): Promise<UseView> {
  const lesson = await lessonOf(db, studioId, address)
  const tried = await tryDraft(db, studioId, lesson.id)
  const same = await revisionOfSource(db, studioId, lesson.id, sourceShaOf(tried))
  return {
    lesson: { id: lesson.id, slug: lesson.slug, title: tried.lesson.title }, etag: tried.etag, number: await nextNumber(db, studioId, lesson.id), findings: tried.findings,
    keys: tried.keys.map(({ key, title }) => ({ key, title })), ...effectOf(tried.previous, tried.lesson),
    same: same ? { id: same.id, number: same.number, inUse: lesson.currentRevision === same.id } : null,
  }
}

export interface PutIntoUse { revision: { id: string, number: number }, same: boolean, etag: string }

/**
 * Makes the draft a revision and puts it into use. 409 where the text is no longer the one the page showed, 422 with the
 * findings where it has errors. The same id again, or the very same source again, is the same revision.
 */
export async function putIntoUse(db: Db, who: Actor, address: string, body: UseBody, now: Date): Promise<PutIntoUse> {
  const { id: lessonId } = await lessonOf(db, who.studioId, address)
  const tried = await tryDraft(db, who.studioId, lessonId)
  return await inTransaction(db, async (tx) => {
    const [lesson] = await tx.select().from(lessons).where(and(eq(lessons.studioId, who.studioId), eq(lessons.id, lessonId))).for('update')
    const draft = await draftOf(tx, who.studioId, lessonId, true)
    const [pressed] = await tx.select({ id: revisions.id, number: revisions.number }).from(revisions).where(and(eq(revisions.studioId, who.studioId), eq(revisions.lessonId, lessonId), eq(revisions.id, body.id)))
    if (pressed) return { revision: pressed, same: true, etag: draft.etag }
    const isSeen = draft.etag === body.etag && tried.etag === body.etag && sourceShaOf({ ...tried, shas: shasOf(await picturesBeside(tx, who.studioId, lessonId)) }) === sourceShaOf(tried)
    const again = await revisionOfSource(tx, who.studioId, lessonId, sourceShaOf(tried))
    if (again) return { revision: sameAgain(found(lesson), again), same: true, etag: draft.etag }
    if (!isSeen) refuse(409, 'The text or its pictures changed since this page opened. Read it again, then put it into use.')
    if (found(lesson).putAwayAt) refuse(409, 'This lesson is put away. Take it out first.')
    const errors = errorsOf(tried)
    if (errors.length > 0) refuse(422, errors.length === 1 ? 'One error keeps this lesson from use. Mend it first.' : `${errors.length} errors keep this lesson from use. Mend them first.`, { findings: tried.findings })
    const number = await nextNumber(tx, who.studioId, lessonId)
    if ((body.effect === 'first') !== (number === 1)) refuse(422, number === 1 ? 'This is the first revision.' : 'Say what changes for those who hold this lesson.')
    if (number > 1 && body.note === '') refuse(422, 'Say in a few words what changed.', { fieldErrors: { note: ['Say in a few words what changed.'] } })
    return { revision: { id: body.id, number }, same: false, etag: await writeRevision(tx, who, { lessonId, number, tried, body, etag: draft.etag }, now) }
  })
}

/** The very text of an earlier revision makes no new one. */
function sameAgain(lesson: LessonRecord, { id, number }: { id: string, number: number }): { id: string, number: number } {
  if (lesson.currentRevision !== id) refuse(409, `This is revision ${number} to the letter. To use it again, put revision ${number} back in use.`, { revision: { id, number } })
  return { id, number }
}

/** The rows of a new revision; its register row last. Returns the draft's etag, a new one where keys were written in. */
async function writeRevision(tx: Tx, who: Actor, { lessonId, number, tried, body, etag }: { lessonId: string, number: number, tried: Tried, body: UseBody, etag: string }, now: Date): Promise<string> {
  const { source, lesson } = tried
  const revision = {
    studioId: who.studioId, id: body.id, lessonId, number, source, sourceSha: sourceShaOf(tried), compiled: lesson, compiledSha: shaOf(lesson), format: lesson.format, compiler: COMPILER,
    engine: FIGURE_ENGINE, title: lesson.title.slice(0, 200), effect: body.effect, note: body.note, by: who.personId, at: now,
  }
  await tx.insert(revisions).values(revision)
  const beside = await tx.select({ name: draftPictures.name, pictureId: draftPictures.pictureId }).from(draftPictures).where(and(eq(draftPictures.studioId, who.studioId), eq(draftPictures.lessonId, lessonId)))
  const shown = tried.uses.flatMap(({ name, alt, mirror }) => beside.filter(row => row.name === name).map(({ pictureId }) => ({ studioId: who.studioId, revisionId: body.id, name, pictureId, alt: alt.slice(0, 500), mirror: Number(mirror) })))
  if (shown.length > 0) await tx.insert(revisionPictures).values(shown)
  await tx.update(lessons).set({ craft: lesson.craft }).where(and(eq(lessons.studioId, who.studioId), eq(lessons.id, lessonId)))
  await setCurrent(tx, who.studioId, lessonId, body.id)
  const kept = tried.keys.length > 0 ? { source, savedBy: who.personId, savedAt: now, etag: body.id } : {}
  await tx.update(drafts).set({ ...kept, baseRevision: body.id }).where(and(eq(drafts.studioId, who.studioId), eq(drafts.lessonId, lessonId)))
  await recordAct(tx, who, body.id, 'into-use', revision, now)
  return kept.etag ?? etag
}

async function nextNumber(db: DbOrTx, studioId: string, lessonId: string): Promise<number> {
  const [row] = await db.select({ last: max(revisions.number) }).from(revisions).where(and(eq(revisions.studioId, studioId), eq(revisions.lessonId, lessonId)))
  return (row?.last ?? 0) + 1
}

async function revisionOfSource(db: DbOrTx, studioId: string, lessonId: string, sourceSha: string) {
  const [row] = await db.select({ id: revisions.id, number: revisions.number }).from(revisions)
    .where(and(eq(revisions.studioId, studioId), eq(revisions.lessonId, lessonId), eq(revisions.sourceSha, sourceSha)))
  return row ?? null
}
