import { z } from 'zod'
import { SeenWish } from '#shared/optics/seen-wish'
import { OPTION_DEFAULTS, TILT_MAX, TILT_MIN } from './option-defaults'

export { TILT_MAX, TILT_MIN } from './option-defaults'

/** Widest and highest picture, pixels. */
export const PICTURE_SIDE_MAX = 4096
export const PICTURE_SIDE_MIN = 16

/** Where the light stands: the tent of the bench, one of its two extremes, or a lamp on the arc between them. */
export const PictureLight = z.union([
  z.enum(['bench', 'face', 'flop']),
  z.object({ tilt: z.number().min(TILT_MIN).max(TILT_MAX) }),
])
export type PictureLight = z.output<typeof PictureLight>

/** How much of the stack is shown: the bare ground, up to and with one coat, or all of it. */
export const UpTo = z.union([z.literal('ground'), z.literal('all'), z.uuid()])
export type UpTo = z.output<typeof UpTo>

/** `coarse` is a quarter of the size in each direction, `screen` refines jumps, `print` refines finer ones. */
export const PICTURE_QUALITIES = ['coarse', 'screen', 'print'] as const

const side = z.number().int().min(PICTURE_SIDE_MIN).max(PICTURE_SIDE_MAX)

/** What a picture of a look should show and how it should be lit. */
export const PictureOptions = z.object({
  width: side,
  height: side,
  /** Degrees about the long axis: 0 left flank, 90 back, 180 right flank (belly up), 270 belly. */
  roll: z.number().min(-360).max(360).default(OPTION_DEFAULTS.roll),
  /** Which way the nose points: to the right turns the picture half round, so roll 180 shows the right flank with its back up. */
  nose: z.enum(['left', 'right']).default(OPTION_DEFAULTS.nose),
  light: PictureLight.default(OPTION_DEFAULTS.light),
  /** The lamp, the water in between and whose eye. */
  seen: SeenWish.default(OPTION_DEFAULTS.seen),
  upTo: UpTo.default(OPTION_DEFAULTS.upTo),
  /** Seen under a gloss clear; without it, as it stands before clear: matt, and clear coats left out. */
  clear: z.boolean().default(OPTION_DEFAULTS.clear),
  /** Grey around the blank, 0-255, exactly; null leaves it transparent. */
  surround: z.number().int().min(0).max(255).nullable().default(OPTION_DEFAULTS.surround),
  /** A soft shadow in the surround: for cards and walls, off where colours are judged. */
  shadow: z.boolean().default(OPTION_DEFAULTS.shadow),
  /** The promised colours only: no form, no gloss. */
  plain: z.boolean().default(OPTION_DEFAULTS.plain),
  quality: z.enum(PICTURE_QUALITIES).default(OPTION_DEFAULTS.quality),
  /** Scale; absent, the blank fills the picture. */
  mmPerPixel: z.number().min(0.005).max(10).optional(),
})
export type PictureOptions = z.output<typeof PictureOptions>
/** Options as a caller writes them: what is left out takes its default. */
export type PictureWish = z.input<typeof PictureOptions>

/** A drawn picture. */
export interface Picture {
  width: number
  height: number
  /** Encoded sRGB, straight alpha, four bytes a pixel. */
  rgba: Uint8ClampedArray<ArrayBuffer>
  mmPerPixel: number
  /** Where the nose's end of the axis (0, 0, 0) falls, pixels from the left and top. */
  origin: readonly [x: number, y: number]
}

/** The options with every default filled in. */
export function pictureOptions(wish: PictureWish): PictureOptions {
  return PictureOptions.parse(wish)
}
