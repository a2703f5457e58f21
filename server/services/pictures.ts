import { and, asc, count, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { MOST_PICTURE_BYTES, PICTURE_NAME, PICTURE_NAME_SAYS } from '../../shared/schemas/lessons'
import type { DraftPicture } from '../../shared/types/lessons'
import { may } from '../../shared/judging/roles'
import type { Db, DbOrTx } from '../db/client'
import { inTransaction, isDuplicate } from '../db/transaction'
import { classLessons, draftPictures, pictures, revisionPictures, revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import { classPeople } from '../db/schema/studio'
import type { Actor } from './actor'
import type { Files } from './files'
import { keptImage } from './images'
import { lessonOf } from './lessons'
import { found, refuse } from './refuse'

/** Pictures beside one lesson; far above what a lesson shows, and a limit all the same. */
const MOST_BESIDE = 250

/** A picture ready to be kept: bytes that were written by us, never those that came. */
export interface CleanPicture { bytes: Buffer, kind: 'image/webp' | 'image/jpeg' | 'image/svg+xml', width: number, height: number }
/** What is sent for a picture, with the hash that never changes while the bytes do not. */
export interface ServedPicture { bytes: Buffer, kind: string, sha: string }

/** A photograph for a lesson: known by its content, turned upright, scaled down, written anew without where it was taken. */
export async function cleanPhotograph(bytes: Buffer): Promise<CleanPicture> {
  const { type, ...kept } = await keptImage(bytes, { as: 'image/webp', most: MOST_PICTURE_BYTES, what: 'picture' })
  return { ...kept, kind: type }
}

/** Keeps a clean picture under a name beside a lesson's text. The same name again takes the place of the one before. */
export async function keepPicture(db: Db, files: Files, studioId: string, lessonId: string, name: string, picture: CleanPicture, now: Date): Promise<DraftPicture> {
  if (!PICTURE_NAME.test(name)) refuse(400, PICTURE_NAME_SAYS)
  const sha = await files.put('pictures', picture.bytes)
  const { width, height } = picture
  const bytes = picture.bytes.length
  await inTransaction(db, async (tx) => {
    const [beside] = await tx.select({ count: count() }).from(draftPictures).where(and(eq(draftPictures.studioId, studioId), eq(draftPictures.lessonId, lessonId)))
    if ((beside?.count ?? 0) >= MOST_BESIDE) refuse(422, `There are ${MOST_BESIDE} pictures beside this lesson. Take away those it does not use.`)
    const id = ulid(now.getTime())
    await tx.insert(pictures).values({ studioId, id, sha, kind: picture.kind, bytes, width, height }).catch((error: unknown) => {
      if (!isDuplicate(error)) throw error
    })
    const [kept] = await tx.select({ id: pictures.id }).from(pictures).where(and(eq(pictures.studioId, studioId), eq(pictures.sha, sha)))
    const pictureId = found(kept).id
    await tx.insert(draftPictures).values({ studioId, lessonId, name, pictureId }).onDuplicateKeyUpdate({ set: { pictureId } })
  })
  return { name, sha, width, height, bytes }
}

/** Takes in a photograph beside a lesson of the studio. */
export async function addPicture(db: Db, files: Files, who: Actor, address: string, name: string, bytes: Buffer, now: Date): Promise<DraftPicture> {
  const lesson = await lessonOf(db, who.studioId, address)
  return await keepPicture(db, files, who.studioId, lesson.id, name, await cleanPhotograph(bytes), now)
}

/** The pictures that lie beside a lesson's text, by name. */
export async function picturesBeside(db: DbOrTx, studioId: string, lessonId: string): Promise<DraftPicture[]> {
  return await db.select({ name: draftPictures.name, sha: pictures.sha, width: pictures.width, height: pictures.height, bytes: pictures.bytes }).from(draftPictures)
    .innerJoin(pictures, and(eq(pictures.studioId, draftPictures.studioId), eq(pictures.id, draftPictures.pictureId)))
    .where(and(eq(draftPictures.studioId, studioId), eq(draftPictures.lessonId, lessonId))).orderBy(asc(draftPictures.name))
}

/** Takes a picture from beside the text. Revisions that show it keep it. */
export async function takeAwayPicture(db: Db, who: Actor, address: string, name: string): Promise<void> {
  const lesson = await lessonOf(db, who.studioId, address)
  await db.delete(draftPictures).where(and(eq(draftPictures.studioId, who.studioId), eq(draftPictures.lessonId, lesson.id), eq(draftPictures.name, name)))
}

/** A picture beside the text, for who writes. */
export async function draftPicture(db: Db, files: Files, studioId: string, address: string, name: string): Promise<ServedPicture> {
  const lesson = await lessonOf(db, studioId, address)
  const [row] = await db.select({ sha: pictures.sha, kind: pictures.kind }).from(draftPictures)
    .innerJoin(pictures, and(eq(pictures.studioId, draftPictures.studioId), eq(pictures.id, draftPictures.pictureId)))
    .where(and(eq(draftPictures.studioId, studioId), eq(draftPictures.lessonId, lesson.id), eq(draftPictures.name, name)))
  return await served(files, found(row))
}

/** A picture of a revision: for who may see lessons, who was ever in a class that has this one, and who made a piece of it. */
export async function revisionPicture(db: Db, files: Files, who: Actor, revisionId: string, name: string): Promise<ServedPicture> {
  const [row] = await db.select({ sha: pictures.sha, kind: pictures.kind, lessonId: revisions.lessonId }).from(revisionPictures)
    .innerJoin(pictures, and(eq(pictures.studioId, revisionPictures.studioId), eq(pictures.id, revisionPictures.pictureId)))
    .innerJoin(revisions, and(eq(revisions.studioId, revisionPictures.studioId), eq(revisions.id, revisionPictures.revisionId)))
    .where(and(eq(revisionPictures.studioId, who.studioId), eq(revisionPictures.revisionId, revisionId), eq(revisionPictures.name, name)))
  const picture = found(row)
  if (!may(who.roles, 'see-lessons') && !await isTaughtTo(db, who, picture.lessonId)) found(null)
  return await served(files, picture)
}

async function served(files: Files, { sha, kind }: { sha: string, kind: string }): Promise<ServedPicture> {
  return { bytes: found(await files.get('pictures', sha)), kind, sha }
}

/** Is or was this lesson one of the person's classes', or did they make a piece of it? */
async function isTaughtTo(db: Db, who: Actor, lessonId: string): Promise<boolean> {
  const inClass = await db.select({ id: classLessons.id }).from(classLessons)
    .innerJoin(classPeople, and(eq(classPeople.studioId, classLessons.studioId), eq(classPeople.classId, classLessons.classId)))
    .where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.lessonId, lessonId), eq(classPeople.personId, who.personId))).limit(1)
  if (inClass.length > 0) return true
  const made = await db.select({ id: pieces.id }).from(pieces).where(and(eq(pieces.studioId, who.studioId), eq(pieces.personId, who.personId), eq(pieces.lessonId, lessonId))).limit(1)
  return made.length > 0
}
