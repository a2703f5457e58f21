import { and, eq } from 'drizzle-orm'
import { sha256 } from '../../shared/lesson/canonical'
import { may } from '../../shared/judging/roles'
import type { Db } from '../db/client'
import { photos, pieces } from '../db/schema/pieces'
import type { Actor } from './actor'
import type { Files } from './files'
import { keptImage } from './images'
import { found, refuse } from './refuse'

async function photoOf(db: Db, studioId: string, id: string) {
  const [row] = await db.select({ photo: photos, maker: pieces.personId }).from(photos)
    .innerJoin(pieces, and(eq(pieces.studioId, photos.studioId), eq(pieces.id, photos.pieceId)))
    .where(and(eq(photos.studioId, studioId), eq(photos.id, id)))
  return found(row)
}

/** Keeps the photo that an event has told of. The bytes must be those the event names; the same again changes nothing. */
export async function keepPhoto(db: Db, files: Files, who: Actor, id: string, bytes: Buffer): Promise<{ state: 'held' }> {
  const { photo, maker } = await photoOf(db, who.studioId, id)
  if (maker !== who.personId) found(null)
  if (photo.state === 'erased') refuse(409, 'This photo was taken away from the record.')
  if (sha256(bytes) !== photo.claimedSha) refuse(422, 'This is not the photo that was taken. It is kept on the tablet; send it again.')
  if (photo.state === 'held') return { state: 'held' }
  const known = await sameBytes(db, who.studioId, photo.claimedSha)
  if (known) {
    await db.update(photos).set({ state: 'held', ...known }).where(and(eq(photos.studioId, who.studioId), eq(photos.id, id)))
    return { state: 'held' }
  }
  const kept = await keptImage(bytes)
  const fileSha = await files.put('photos', kept.bytes)
  await db.update(photos).set({ state: 'held', fileSha, bytes: kept.bytes.length, width: kept.width, height: kept.height })
    .where(and(eq(photos.studioId, who.studioId), eq(photos.id, id)))
  return { state: 'held' }
}

/** The same photograph under another name is one file; it need not be opened again. */
async function sameBytes(db: Db, studioId: string, claimedSha: string) {
  const [row] = await db.select({ fileSha: photos.fileSha, bytes: photos.bytes, width: photos.width, height: photos.height }).from(photos)
    .where(and(eq(photos.studioId, studioId), eq(photos.claimedSha, claimedSha), eq(photos.state, 'held'))).limit(1)
  return row ?? null
}

/** The kept bytes of a photo, for its maker and for who may see pieces of the studio. */
export async function readPhoto(db: Db, files: Files, who: Actor, id: string): Promise<Buffer> {
  const { photo, maker } = await photoOf(db, who.studioId, id)
  if (maker !== who.personId && !may(who.roles, 'see-pieces')) found(null)
  if (photo.state !== 'held' || !photo.fileSha) refuse(404, photo.state === 'awaited' ? 'This photo is still on its tablet.' : 'This photo was taken away from the record.')
  return found(await files.get('photos', photo.fileSha))
}
