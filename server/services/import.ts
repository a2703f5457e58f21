import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { compile } from '../../shared/lesson/compile'
import { MOST_SOURCE, PICTURE_NAME, PICTURE_NAME_SAYS, SLUG } from '../../shared/schemas/lessons'
import type { Db } from '../db/client'
import { inTransaction } from '../db/transaction'
import { lessons } from '../db/schema/lessons'
import type { Actor } from './actor'
import { replaceDraft } from './drafts'
import type { Files } from './files'
import { writeLesson } from './lessons'
import { cleanPhotograph, keepPicture, type CleanPicture } from './pictures'
import { refuse } from './refuse'
import { cleanSvg } from './svg'

export interface ImportedLesson { slug: string, source: string, pictures: ReadonlyMap<string, Buffer> }
export interface Imported { lessonId: string, slug: string, etag: string, isNew: boolean, pictures: string[] }

/**
 * Takes a lesson in as a draft: its text to the byte, its pictures made safe. The lesson of that slug gets a new draft,
 * else a lesson is made. All pictures are cleaned before anything is kept, so a bad one leaves nothing behind.
 */
export async function importLesson(db: Db, who: Actor, { slug, source, pictures }: ImportedLesson, now: Date, files: Files): Promise<Imported> {
  if (!SLUG.test(slug) || slug.length > 40) refuse(422, `${slug}: a lesson’s folder is named by small letters, digits and hyphens, at most 40.`)
  if (source.length > MOST_SOURCE) refuse(413, `${slug}: this is longer than a lesson can be.`)
  const clean = new Map<string, CleanPicture>()
  for (const [name, bytes] of pictures) clean.set(name, await cleanPicture(name, bytes))
  const { lessonId, isNew } = await lessonForSlug(db, who, slug, source, now)
  const { etag } = await replaceDraft(db, who, lessonId, source, now)
  for (const [name, picture] of clean) await keepPicture(db, files, who.studioId, lessonId, name, picture, now)
  return { lessonId, slug, etag, isNew, pictures: [...clean.keys()] }
}

async function cleanPicture(name: string, bytes: Buffer): Promise<CleanPicture> {
  if (!PICTURE_NAME.test(name)) refuse(422, `${name}: ${PICTURE_NAME_SAYS}`)
  return name.endsWith('.svg') ? cleanSvg(bytes) : await cleanPhotograph(bytes)
}

async function lessonForSlug(db: Db, who: Actor, slug: string, source: string, now: Date): Promise<{ lessonId: string, isNew: boolean }> {
  return await inTransaction(db, async (tx) => {
    const [there] = await tx.select({ id: lessons.id }).from(lessons).where(and(eq(lessons.studioId, who.studioId), eq(lessons.slug, slug)))
    if (there) return { lessonId: there.id, isNew: false }
    const id = ulid(now.getTime())
    await writeLesson(tx, who, { id, slug, craft: compile(source, {}).lesson.craft, source }, now)
    return { lessonId: id, isNew: true }
  })
}
