import type { H3Event } from 'h3'
import { readLimited } from '#server/http/read-limited'
import { Problem } from '#shared/errors/problem'
import { PHOTO_BYTES_MAX, PHOTO_PIXELS_MAX } from '#shared/photos/photo-limits'

/** The photo file that is the body of the request. */
export async function readPhotoFile(event: H3Event): Promise<Buffer> {
  try {
    return await readLimited(event, PHOTO_BYTES_MAX)
  }
  catch (error) {
    if (error instanceof Problem && error.data.code === 'request/too-large')
      throw new Problem({ code: 'photo/too-large', maxBytes: PHOTO_BYTES_MAX, maxPixels: PHOTO_PIXELS_MAX })
    throw error
  }
}
