import { z } from 'zod'

export const POINTS_MAX = 400
export const STROKES_MAX = 200
export const DOTS_MAX = 600

/** A place on the body: u, share of the widest meridian from nose to tail; v, share of the half girth from back (0) by the widest line (½) to belly (1). */
export const Place = z.tuple([z.number().min(-0.2).max(1.2), z.number().min(-0.5).max(1.5)])
export type Place = z.output<typeof Place>

/** A line of the airbrush, a dagger stroke (thick to thin) or a line of a brush. Widths in mm, amounts as a share of the coat. */
export const Stroke = z.object({
  points: z.array(Place).min(2).max(POINTS_MAX),
  width: z.tuple([z.number().min(0.02).max(40), z.number().min(0.02).max(40)]),
  amount: z.tuple([z.number().min(0).max(3), z.number().min(0).max(3)]),
})
export type Stroke = z.output<typeof Stroke>

/** The one flank something is drawn on; absent when both carry it, the right one turned over. */
const only = z.enum(['left', 'right']).optional()
export type OnlySide = z.output<typeof only>

/** Something painted freehand: geometry on the body, never pixels. */
export const Mark = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('strokes'), with: z.enum(['airbrush', 'brush']), strokes: z.array(Stroke).min(1).max(STROKES_MAX), only }),
  /** Rays from one root, as a painted fin. Angles in degrees below the axis toward the tail, lengths in mm at a body of 100 mm. */
  z.object({
    kind: z.literal('fan'), root: Place, count: z.number().int().min(2).max(30), length: z.tuple([z.number(), z.number()]),
    angle: z.tuple([z.number(), z.number()]), width: z.tuple([z.number(), z.number()]), amount: z.tuple([z.number(), z.number()]), only,
  }),
  /** Dots placed by hand: place and radius (mm). */
  z.object({
    kind: z.literal('dots'), dots: z.array(z.tuple([z.number(), z.number(), z.number().min(0.02).max(30)])).min(1).max(DOTS_MAX),
    soft: z.number().min(0.02).max(5).default(0.1), /** grows every dot, for a halo, mm */ grow: z.number().min(-5).max(5).default(0), only,
  }),
  /** Dots scattered from a seed with a least distance (mm); the same seed and numbers scatter alike. */
  z.object({
    kind: z.literal('scatter'), seed: z.number().int().min(0).max(2 ** 31), count: z.number().int().min(1).max(600),
    u: z.tuple([z.number(), z.number()]), v: z.tuple([z.number(), z.number()]), radius: z.tuple([z.number(), z.number()]),
    apart: z.number().min(0).max(60), soft: z.number().min(0.02).max(5).default(0.1), grow: z.number().min(-5).max(5).default(0),
  }),
  /** A closed outline filled freehand, with a soft or torn edge (mm). */
  z.object({
    kind: z.literal('outline'), points: z.array(Place).min(3).max(POINTS_MAX), soft: z.number().min(0.02).max(10), wobble: z.number().min(0).max(5).default(0),
    amount: z.number().min(0).max(3).default(1), only,
  }),
  /** Worm tracks: pale winding lines. Wavelength and width in mm at a body of 100 mm. */
  z.object({ kind: z.literal('worm tracks'), seed: z.number().int().min(0).max(2 ** 31), wavelength: z.number().min(0.5).max(30), width: z.number().min(0.05).max(10) }),
  /** A torn sponge: patches of a size (mm), cut at a threshold, with a soft edge. */
  z.object({ kind: z.literal('torn sponge'), seed: z.number().int().min(0).max(2 ** 31), size: z.number().min(0.5).max(40), threshold: z.number().min(-1).max(1), soft: z.number().min(0.01).max(1) }),
])
export type Mark = z.output<typeof Mark>
