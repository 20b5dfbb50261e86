import sharp, { type Sharp } from 'sharp'
import { photoKind } from './photo-kind'
import { PHOTO_BYTES_MAX, PHOTO_PIXELS_MAX, PREVIEW_SIZE, RENDITION_WIDTHS, type PhotoFormat } from '#shared/photos/photo-limits'

/** A copy made for showing: its name under the photo's key, and its bytes. */
export interface Rendition { file: string, contentType: 'image/webp' | 'image/jpeg', bytes: Uint8Array<ArrayBuffer> }

/** A photo taken in: upright, in sRGB, in every size it is shown in. */
export interface ProcessedPhoto {
  format: PhotoFormat
  /** Size as shown, after turning it upright. */
  width: number
  height: number
  renditions: Rendition[]
}

export type PhotoRefusal = 'photo/not-an-image' | 'photo/too-large' | 'photo/unreadable'

/** What lies behind a photo with clear parts and beside a long one. @source Munsell N6, as tokens.css */
const SURROUND = '#929292'

/** Why a file cannot be taken in. */
export class PhotoRefused extends Error {
  override name = 'PhotoRefused'

  constructor(readonly code: PhotoRefusal) {
    super(code)
  }
}

/**
 * Decodes a camera file and draws its copies anew: turned upright, colours brought to sRGB, every kind of metadata left behind
 * (position, serial numbers, thumbnails, profiles), since nothing but pixels goes into a copy.
 *
 * @throws {PhotoRefused} when the file is no photo, has too many pixels or bytes, or breaks off
 */
export async function processPhoto(bytes: Uint8Array): Promise<ProcessedPhoto> {
  const format = photoKind(bytes)
  if (!format) throw new PhotoRefused('photo/not-an-image')
  if (bytes.byteLength > PHOTO_BYTES_MAX) throw new PhotoRefused('photo/too-large')
  try {
    return await drawCopies(bytes, format)
  }
  catch (error) {
    if (error instanceof PhotoRefused) throw error
    throw new PhotoRefused('photo/unreadable')
  }
}

async function drawCopies(bytes: Uint8Array, format: PhotoFormat): Promise<ProcessedPhoto> {
  const file = sharp(bytes, { failOn: 'truncated', limitInputPixels: false, pages: 1 })
  const head = await file.metadata()
  if (head.width * head.height > PHOTO_PIXELS_MAX) throw new PhotoRefused('photo/too-large')

  // Decoded once at the largest size that is shown; the smaller copies are drawn from it.
  const widest = Math.max(...RENDITION_WIDTHS)
  const { data, info } = await file.autoOrient()
    .resize({ width: widest, height: widest, fit: 'inside', withoutEnlargement: true })
    .flatten({ background: SURROUND }).toColourspace('srgb').raw().toBuffer({ resolveWithObject: true })
  const upright = sharp(data, { raw: { width: info.width, height: info.height, channels: info.channels } })

  const renditions = await Promise.all(RENDITION_WIDTHS.map(async (width): Promise<Rendition[]> => {
    const sized = () => upright.clone().resize({ width, height: width, fit: 'inside', withoutEnlargement: true })
    return [
      { file: `${width}.webp`, contentType: 'image/webp', bytes: await whole(sized().webp({ quality: 80 })) },
      { file: `${width}.jpg`, contentType: 'image/jpeg', bytes: await whole(sized().jpeg({ quality: 82, mozjpeg: true })) },
    ]
  }))
  // A photo longer than the preview keeps its whole length, nose to tail, on the grey it is judged on; a taller one is filled.
  const isLong = info.width * PREVIEW_SIZE.height > info.height * PREVIEW_SIZE.width
  const preview = await whole(upright.clone().resize({ ...PREVIEW_SIZE, fit: isLong ? 'contain' : 'cover', background: SURROUND }).jpeg({ quality: 82, mozjpeg: true }))
  const turned = (head.orientation ?? 1) >= 5
  return {
    format,
    width: turned ? head.height : head.width,
    height: turned ? head.width : head.height,
    renditions: [...renditions.flat(), { file: 'preview.jpg', contentType: 'image/jpeg', bytes: preview }],
  }
}

async function whole(image: Sharp): Promise<Uint8Array<ArrayBuffer>> {
  return new Uint8Array(await image.toBuffer())
}
