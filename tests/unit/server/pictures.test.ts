import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { cleanPhotograph } from '#server/services/pictures'

const photograph = (width: number, height: number) => sharp({ create: { width, height, channels: 3, background: '#a07030' } })
const refusal = async (bytes: Buffer) => await cleanPhotograph(bytes).then(() => null, (error: unknown) => error)

describe('a photograph for a lesson', () => {
  it('is scaled down to 1600 on its longest side and written anew as WebP', async () => {
    const kept = await cleanPhotograph(await photograph(3200, 800).png().toBuffer())
    expect(kept).toMatchObject({ kind: 'image/webp', width: 1600, height: 400 })
    expect((await sharp(kept.bytes).metadata()).format).toBe('webp')
  })

  it('is turned upright and says nothing of where it was taken', async () => {
    const taken = await photograph(300, 200).jpeg().withExif({ IFD0: { Artist: 'A name' }, IFD3: { GPSLatitude: '51/1 30/1 0/1', GPSLatitudeRef: 'N' } }).withMetadata({ orientation: 6 }).toBuffer()
    expect((await sharp(taken).metadata()).exif).toBeDefined()
    const kept = await cleanPhotograph(taken)
    expect(kept).toMatchObject({ width: 200, height: 300 })
    expect((await sharp(kept.bytes).metadata()).exif).toBeUndefined()
  })

  it('is known by what it is, not by what it is called', async () => {
    expect(await refusal(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>'))).toMatchObject({ statusCode: 422, message: expect.stringContaining('This is no picture') })
    expect(await refusal(Buffer.from('%PDF-1.7 not a picture at all'))).toMatchObject({ statusCode: 422 })
    expect(await refusal(await photograph(20, 20).gif().toBuffer())).toMatchObject({ statusCode: 422 })
  })

  it('is refused when half of it is missing', async () => {
    const whole = await photograph(800, 600).jpeg().toBuffer()
    expect(await refusal(whole.subarray(0, whole.length >> 1))).toMatchObject({ statusCode: 422, message: expect.stringContaining('broken') })
  })

  it('is refused when a small file unpacks into a very large picture', async () => {
    const bomb = await sharp({ create: { width: 12_000, height: 4000, channels: 3, background: '#000' }, limitInputPixels: false }).png({ compressionLevel: 9 }).toBuffer()
    expect(bomb.length).toBeLessThan(1_000_000)
    expect(await refusal(bomb)).toMatchObject({ statusCode: 422, message: expect.stringContaining('far too large') })
  })

  it('is refused over 32 MB, before it is opened', async () => {
    expect(await refusal(Buffer.alloc(32_000_001))).toMatchObject({ statusCode: 413, message: expect.stringContaining('32 MB') })
  })
})
