/** Photos are made new on the tablet before they are kept: small, JPEG, and without where they were taken. */
export const LONGEST_SIDE = 1600
export const MOST_PHOTO_BYTES = 20_000_000
export interface MadePhoto { blob: Blob, width: number, height: number }
export type Made = { ok: true, photo: MadePhoto } | { ok: false, says: string }

const NO_PHOTO = 'This is not a photo that can be read here. Choose a JPEG, PNG or WebP, or use the camera.'

/** Width and height with the longest side brought down to `most`; never made larger. */
export function fitted(width: number, height: number, most = LONGEST_SIDE): { width: number, height: number } {
  const scale = Math.min(1, most / Math.max(width, height, 1))
  return { width: Math.max(1, Math.round(width * scale)), height: Math.max(1, Math.round(height * scale)) }
}

/** A chosen file as a photo of ours, or what is wrong with it. */
export async function photoFromFile(file: File): Promise<Made> {
  if (file.size > MOST_PHOTO_BYTES * 4) return { ok: false, says: 'This file is very large. Take the photo with the camera of the tablet, or choose a smaller one.' }
  if (file.type !== '' && !file.type.startsWith('image/')) return { ok: false, says: NO_PHOTO }
  const bitmap = await createImageBitmap(file, { imageOrientation: 'from-image' }).catch(() => null)
  if (!bitmap) return { ok: false, says: NO_PHOTO }
  const made = await photoFrom(bitmap, bitmap.width, bitmap.height)
  bitmap.close()
  return made
}

/** What the camera or a file shows, drawn again. */
export async function photoFrom(source: CanvasImageSource, wide: number, high: number): Promise<Made> {
  const { width, height } = fitted(wide, high)
  const canvas = new OffscreenCanvas(width, height)
  const context = canvas.getContext('2d')
  if (!context || wide < 1 || high < 1) return { ok: false, says: NO_PHOTO }
  context.drawImage(source, 0, 0, width, height)
  const blob = await canvas.convertToBlob({ type: 'image/jpeg', quality: 0.85 })
  if (blob.size > MOST_PHOTO_BYTES) return { ok: false, says: 'This photo stays larger than 20 MB. Take it again with the camera of the tablet.' }
  return { ok: true, photo: { blob, width, height } }
}
