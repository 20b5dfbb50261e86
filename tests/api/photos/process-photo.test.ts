import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { type ProcessedPhoto, processPhoto } from '#server/photos/process-photo'
import { RENDITION_WIDTHS } from '#shared/photos/photo-limits'
import { cameraPhoto, metadataIn, PLANTED } from '../../fixtures/camera-photo'

const copy = (photo: ProcessedPhoto, file: string) => photo.renditions.find(rendition => rendition.file === file)!.bytes

/** Mean colour of the part of a picture that starts at a share of its width and height and is a tenth of it wide. */
async function colourAt(bytes: Uint8Array, x: number, y: number): Promise<number[]> {
  const { width, height } = await sharp(bytes).metadata()
  const part = { left: Math.floor(x * width), top: Math.floor(y * height), width: Math.floor(width / 10), height: Math.floor(height / 10) }
  const { channels } = await sharp(await sharp(bytes).extract(part).toBuffer()).stats()
  return channels.slice(0, 3).map(channel => channel.mean)
}

describe('taking a photo in', () => {
  it.each([
    [1, 0.1, 0.1], [3, 0.8, 0.8], [6, 0.8, 0.1], [8, 0.1, 0.8],
  ])('turns orientation %i upright', async (orientation, x, y) => {
    const photo = await processPhoto(await cameraPhoto({ width: 600, height: 400, orientation }))
    const upright = orientation < 5 ? [600, 400] : [400, 600]
    expect([photo.width, photo.height]).toEqual(upright)
    const [red, green] = await colourAt(copy(photo, '640.jpg'), x, y)
    expect(red).toBeGreaterThan(180)
    expect(green).toBeLessThan(90)
  })

  it('brings a wide-gamut colour to sRGB instead of dropping its profile', async () => {
    const photo = await processPhoto(await cameraPhoto({ width: 600, height: 400, orientation: 1, corner: { r: 200, g: 60, b: 60 } }))
    // In the file this red stands as about 186, 73, 68 of Display P3: without its profile it would come out that dull.
    const [red, green, blue] = await colourAt(copy(photo, '1280.jpg'), 0.1, 0.1)
    expect(Math.abs(red! - 200)).toBeLessThan(4)
    expect(Math.abs(green! - 60)).toBeLessThan(5)
    expect(Math.abs(blue! - 60)).toBeLessThan(5)
  })

  it.each(['jpeg', 'png', 'webp', 'avif'] as const)('leaves nothing of a %s file but its pixels in any copy', async (format) => {
    const original = await cameraPhoto({ format, width: 700, height: 500 })
    const photo = await processPhoto(original)
    expect(photo.format).toBe(format)
    const [before, ...after] = await metadataIn([original, ...photo.renditions.map(rendition => rendition.bytes)])
    expect(Object.keys(before!).length).toBeGreaterThan(3)
    expect(after).toEqual(photo.renditions.map(() => ({})))
    for (const { file, bytes } of photo.renditions) {
      const text = Buffer.from(bytes).toString('latin1')
      expect(PLANTED.filter(word => text.includes(word)), file).toEqual([])
    }
  })

  it('keeps the whole length of a long photo in its preview, nose to tail', async () => {
    const ends = await sharp({ create: { width: 1200, height: 300, channels: 3, background: 'green' } })
      .composite([0, 1140].map(left => ({ input: { create: { width: 60, height: 300, channels: 3 as const, background: 'red' } }, left, top: 0 }))).png().toBuffer()
    const preview = copy(await processPhoto(ends), 'preview.jpg')
    for (const x of [0, 0.95]) {
      const { channels } = await sharp(await sharp(preview).extract({ left: Math.round(x * 1200), top: 310, width: 50, height: 10 }).toBuffer()).stats()
      expect(channels[0]!.mean).toBeGreaterThan(200)
    }
  })

  it('makes a copy of every size in both formats, none larger than the photo, and a preview', async () => {
    const photo = await processPhoto(await cameraPhoto({ width: 1000, height: 600, orientation: 1 }))
    expect(photo.renditions.map(rendition => rendition.file).sort()).toEqual(
      [...RENDITION_WIDTHS.flatMap(width => [`${width}.jpg`, `${width}.webp`]), 'preview.jpg'].sort())
    expect(await sharp(copy(photo, '320.webp')).metadata()).toMatchObject({ width: 320, height: 192, format: 'webp' })
    expect(await sharp(copy(photo, '1600.jpg')).metadata()).toMatchObject({ width: 1000, height: 600, format: 'jpeg' })
    expect(await sharp(copy(photo, 'preview.jpg')).metadata()).toMatchObject({ width: 1200, height: 630 })
  })

  it('takes a 40-megapixel photo and refuses a larger one by its header', async () => {
    const plain = (width: number, height: number) => sharp({ create: { width, height, channels: 3, background: 'grey' } }).jpeg().toBuffer()
    expect((await processPhoto(await plain(8000, 5000))).width).toBe(8000)
    await expect(processPhoto(await plain(8000, 5001))).rejects.toMatchObject({ code: 'photo/too-large' })
  })

  it.each([
    ['is an SVG', async () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"/>'), 'photo/not-an-image'],
    ['breaks off', async () => (await cameraPhoto({})).subarray(0, 4000), 'photo/unreadable'],
    ['only begins like a photo', async () => Buffer.concat([Buffer.from([0xFF, 0xD8, 0xFF, 0xE0]), Buffer.alloc(5000, 7)]), 'photo/unreadable'],
    ['is empty', async () => Buffer.alloc(0), 'photo/not-an-image'],
  ])('refuses a file that %s, and says so', async (_, make, code) => {
    await expect(processPhoto(await make())).rejects.toMatchObject({ code })
  })
})
