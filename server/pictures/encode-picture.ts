import sharp from 'sharp'
import type { PaintedPicture } from './paint-picture'

/** Files a picture can be had as. JPEG has no transparency: ask for a surround with it. */
export const PICTURE_FORMATS = ['webp', 'jpeg', 'png'] as const
export type PictureFormat = typeof PICTURE_FORMATS[number]

const QUALITY = { webp: 88, jpeg: 90 }

/** A painted picture as a file. */
export async function encodePicture({ width, height, rgba }: PaintedPicture, format: PictureFormat): Promise<Uint8Array<ArrayBuffer>> {
  const raw = sharp(rgba, { raw: { width, height, channels: 4 } })
  return new Uint8Array(await encoded())

  function encoded(): Promise<Buffer> {
    switch (format) {
      case 'webp': return raw.webp({ quality: QUALITY.webp, smartSubsample: true }).toBuffer()
      case 'jpeg': return raw.flatten().jpeg({ quality: QUALITY.jpeg, chromaSubsampling: '4:4:4' }).toBuffer()
      case 'png': return raw.png().toBuffer()
    }
  }
}
