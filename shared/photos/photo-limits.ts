/** Largest photo file taken in, bytes. */
export const PHOTO_BYTES_MAX = 30 * 1024 * 1024
/** Most pixels a photo may have. */
export const PHOTO_PIXELS_MAX = 40_000_000
export const PHOTOS_PER_SCHEME_MAX = 60
export const ALT_MAX = 300
/** Long edges of the copies that are shown, pixels. */
export const RENDITION_WIDTHS = [320, 640, 1280, 1600] as const
/** Formats of the copies: one that is small, one that everything reads. */
export const RENDITION_FORMATS = ['webp', 'jpg'] as const
/** A link preview, pixels. @source Open Graph images are usually drawn at 1.91 : 1 */
export const PREVIEW_SIZE = { width: 1200, height: 630 } as const

/** What a photo file may be, by what it says of itself. */
export const PHOTO_FORMATS = ['jpeg', 'png', 'webp', 'avif'] as const
export type PhotoFormat = (typeof PHOTO_FORMATS)[number]
