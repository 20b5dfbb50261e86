import { z } from 'zod'
import { ALT_MAX, PHOTOS_PER_SCHEME_MAX } from './photo-limits'

export const PhotoParams = z.object({ photoId: z.uuid() })
/** The copy of a photo that is asked for: a long edge and a format, or the link preview. */
export const PhotoFileParams = PhotoParams.extend({ file: z.string().regex(/^(?:(?:320|640|1280|1600)\.(?:webp|jpg)|preview\.jpg)$/) })

export const PhotoChange = z.object({ alt: z.string().trim().max(ALT_MAX) })
export type PhotoChange = z.output<typeof PhotoChange>

/** All photos of a scheme in the order they are to stand. */
export const PhotoOrder = z.object({ photoIds: z.array(z.uuid()).max(PHOTOS_PER_SCHEME_MAX) })

/** A photo as a member of the workshop sees it. Its copies lie at /api/photos/{id}/{width}.webp and .jpg. */
export const PhotoView = z.object({
  id: z.uuid(),
  schemeId: z.uuid(),
  /** The run it was taken of, when it was taken at the bench. */
  run: z.object({ id: z.uuid(), number: z.number().int() }).nullable(),
  width: z.number().int(),
  height: z.number().int(),
  alt: z.string(),
  addedAt: z.iso.datetime(),
})
export type PhotoView = z.output<typeof PhotoView>
