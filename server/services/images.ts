import { fileTypeFromBuffer } from 'file-type'
import sharp from 'sharp'
import { refuse } from './refuse'

/** The longest side kept, in pixels, and the most pixels opened: a small file can unpack into a very large picture. */
export const LONGEST_SIDE = 1600
const MOST_PIXELS = 40_000_000
export const MOST_BYTES = 20_000_000
const TYPES = new Set(['image/jpeg', 'image/png', 'image/webp'])

export interface ImageLimits {
  as?: KeptImage['type']
  /** Bytes. */
  most?: number
  /** What the sentences call it. */
  what?: 'photo' | 'picture'
}
export interface KeptImage { bytes: Buffer, width: number, height: number, type: 'image/jpeg' | 'image/webp' }

let waiting: Promise<unknown> = Promise.resolve()

/**
 * A photograph made safe to keep: known by its content and not by its name, turned upright, scaled down, written anew, so
 * that where it was taken is gone. 413 over the limit (20 MB), 422 with a sentence for anything that is no whole JPEG, PNG or WebP.
 * One at a time: opening a large picture takes a lot of memory.
 */
export async function keptImage(bytes: Buffer, { as = 'image/jpeg', most = MOST_BYTES, what = 'photo' }: ImageLimits = {}): Promise<KeptImage> {
  if (bytes.length > most) refuse(413, tooLarge(most, what))
  const type = await fileTypeFromBuffer(bytes)
  if (!type || !TYPES.has(type.mime)) refuse(422, `This is no ${what}. Take a JPEG, PNG or WebP picture.`)
  const turn = waiting.then(() => rewrite(bytes, as, what))
  waiting = turn.catch(() => undefined)
  return await turn
}

export const tooLarge = (most: number, what: string): string => `This ${what} is larger than ${Math.round(most / 1_000_000)} MB. Take it again with the camera of the tablet, or a smaller one.`

async function rewrite(bytes: Buffer, as: KeptImage['type'], what: string): Promise<KeptImage> {
  try {
    const image = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'warning' }).rotate().resize(LONGEST_SIDE, LONGEST_SIDE, { fit: 'inside', withoutEnlargement: true })
    const { data, info } = await (as === 'image/webp' ? image.webp({ quality: 82 }) : image.jpeg({ quality: 84 })).toBuffer({ resolveWithObject: true })
    return { bytes: data, width: info.width, height: info.height, type: as }
  }
  catch {
    refuse(422, `This ${what} is broken or far too large to open. Take it again.`)
  }
}
