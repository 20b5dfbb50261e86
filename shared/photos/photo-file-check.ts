import type { ProblemData } from '#shared/errors/problem'
import { PHOTO_BYTES_MAX, PHOTO_PIXELS_MAX } from './photo-limits'

/** Types a browser may give a photo that can be taken in; asking for these makes a phone hand over a JPEG instead of its own kind. */
export const PHOTO_TYPES = ['image/jpeg', 'image/png', 'image/webp', 'image/avif'] as const

/** What can be said of a file before any of it is sent: why it would be refused, or null. A file that gives no type is left for the server to read. */
export function photoFileRefusal({ size, type }: { size: number, type: string }): ProblemData | null {
  if (size > PHOTO_BYTES_MAX) return { code: 'photo/too-large', maxBytes: PHOTO_BYTES_MAX, maxPixels: PHOTO_PIXELS_MAX }
  if (size === 0) return { code: 'photo/not-an-image' }
  if (type !== '' && !PHOTO_TYPES.some(known => known === type)) return { code: 'photo/not-an-image' }
  return null
}
