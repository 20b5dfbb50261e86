import { z } from 'zod'
import { Place, POINTS_MAX } from './mark'

export const MASK_NAME_MAX = 60

/** A net stretched round the body; paint goes through its openings. Millimetres, degrees. */
export const Mesh = z.object({
  kind: z.literal('mesh'),
  weave: z.enum(['hexagon', 'diamond', 'square']),
  /** Distance from thread to thread, mm, relaxed. */
  pitch: z.number().min(0.4).max(30),
  /** Thickness of the thread, mm. */
  thread: z.number().min(0.03).max(10),
  angle: z.number().min(-90).max(90).default(0),
  /** Along the body, relative to across it. */
  stretch: z.number().min(0.3).max(3).default(1),
  /** How much cells shrink with the body toward head and tail, 0 … 1. */
  follow: z.number().min(0).max(1).default(0.7),
  /** How far the net stands off the flank, mm. */
  lift: z.number().min(0).max(5).default(0.15),
})
export type Mesh = z.output<typeof Mesh>

/** A cut plate or tape. The coat goes through the outlines, or stays off them when it shields. */
export const Stencil = z.object({
  kind: z.enum(['stencil', 'tape']),
  /** `opens`: paint goes through the outlines. `shields`: paint stays off them. */
  does: z.enum(['opens', 'shields']).default('opens'),
  outlines: z.array(z.array(Place).min(3).max(POINTS_MAX)).min(1).max(120),
  /** Softness of the edge by lift, mm: .05 tape, .3 held on, .55–.9 held off. */
  soft: z.number().min(0.02).max(5).default(0.3),
  /** Torn or freehand edges, mm. */
  wobble: z.number().min(0).max(5).default(0),
})
export type Stencil = z.output<typeof Stencil>

export const MaskForm = z.discriminatedUnion('kind', [Mesh, Stencil])
export type MaskForm = z.output<typeof MaskForm>

/** A mask as this scheme uses it. The seed makes it the same fitting for every coat it covers. */
export const Mask = z.object({
  id: z.uuid(),
  name: z.string().trim().min(1).max(MASK_NAME_MAX),
  form: MaskForm,
  seed: z.number().int().min(0).max(2 ** 31),
  /** The workshop's mask this was taken from. */
  fromMaskId: z.uuid().nullable().default(null),
})
export type Mask = z.output<typeof Mask>
