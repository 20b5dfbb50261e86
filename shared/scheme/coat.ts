import { z } from 'zod'
import { Mark } from './mark'

export const COAT_NAME_MAX = 80
export const COAT_NOTE_MAX = 500
export const PASSES_MAX = 30
export const DROPS_MAX = 999
export const MIX_PARTS_MAX = 6

/** Zones round the girth. Chosen ones are laid together (back and upper flank make the upper half). */
export const GIRTH_ZONES = ['back', 'upper flank', 'lower flank', 'belly'] as const
/** Zones along the length. A coat lies where a chosen girth zone meets a chosen length zone; none chosen in a direction means no limit in it. */
export const LENGTH_ZONES = ['head', 'gill cover', 'trunk', 'tail'] as const
export const ZoneName = z.enum([...GIRTH_ZONES, ...LENGTH_ZONES])
export type ZoneName = z.output<typeof ZoneName>

/** Where on the body a coat lies. */
export const Where = z.object({
  /** Off: nothing on the body (a coat for the fins only). */
  body: z.boolean().default(true),
  zones: z.array(ZoneName).max(8).default([]),
  /** How far past the zone's edge the coat goes, mm; negative stays short of it. */
  reach: z.number().min(-60).max(60).default(0),
  edge: z.enum(['hard', 'fades']).default('fades'),
  /** Width of a fading edge, mm; absent: a twentieth of the length. */
  fade: z.number().min(0).max(60).optional(),
  /** Limits along the body as shares of the length, with their own fades (mm). */
  along: z.object({
    from: z.number().min(0).max(1), to: z.number().min(0).max(1), fadeFrom: z.number().min(0).max(60), fadeTo: z.number().min(0).max(60),
  }).optional(),
  /** Paint on fins: how much at the root and at the tip, as a share of the coat. */
  fins: z.array(z.object({
    /** The fin's name on the blank, or `all`. */
    fin: z.string().min(1).max(40),
    root: z.number().min(0).max(1).default(1),
    tip: z.number().min(0).max(1).default(1),
    /** On the rays only, on the leading edge only (with its width, mm), or the whole fin. */
    on: z.enum(['whole', 'rays', 'leading edge', 'rim', 'spots']).default('whole'),
    width: z.number().min(0).max(20).optional(),
  })).max(12).default([]),
})
export type Where = z.output<typeof Where>

/** Where the airbrush stands: round the girth, 0 above, 90 level with the flank, 180 below. */
export const Gun = z.discriminatedUnion('aim', [
  z.object({ aim: z.literal('all over') }),
  z.object({
    aim: z.literal('from'),
    /** degrees, 0 above … 180 below, both sides alike */
    angle: z.number().min(0).max(180),
    /** Width of the spray, in mean body radii: .2–.5 a line, .7–1 a fade, 2 flooding. */
    footprint: z.number().min(0.1).max(4),
  }),
])
export type Gun = z.output<typeof Gun>

export const Tool = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('airbrush'),
    /** mm */ nozzle: z.number().min(0.1).max(1.5),
    /** bar, with air flowing */ pressure: z.number().min(0.1).max(6),
    /** cm */ distance: z.number().min(0.5).max(60),
  }),
  z.object({ kind: z.literal('brush') }),
  z.object({ kind: z.literal('sponge') }),
  z.object({ kind: z.literal('dip') }),
])
export type Tool = z.output<typeof Tool>

/** What goes into the cup. */
export const Mix = z.object({
  parts: z.array(z.object({ paintId: z.uuid(), drops: z.number().int().min(1).max(DROPS_MAX) })).max(MIX_PARTS_MAX),
  /** Drops of reducer to the drops above. */
  reducer: z.number().int().min(0).max(DROPS_MAX * 4).default(0),
})
export type Mix = z.output<typeof Mix>

/** Which coat of which build-up of the workshop a coat was laid from. Coats that were laid together share `layingId`. */
export const LaidFrom = z.object({
  buildUpId: z.uuid(),
  /** Edition of the build-up: it rises when its coats change. */
  edition: z.number().int().min(1),
  /** The coat of the build-up. */
  coatId: z.uuid(),
  layingId: z.uuid(),
  /** The zones it was laid in instead of the build-up's own. */
  onto: z.array(ZoneName).max(8).optional(),
})
export type LaidFrom = z.output<typeof LaidFrom>

/** One application of paint. Its id lasts as long as the scheme and its forks, so that a moved coat stays the same coat. */
export const Coat = z.object({
  id: z.uuid(),
  name: z.string().trim().max(COAT_NAME_MAX).default(''),
  mix: Mix,
  tool: Tool,
  gun: Gun,
  where: Where,
  /** Drawn by hand: when there are any, the coat lies on its marks only. */
  marks: z.array(Mark).max(60).default([]),
  /** Light sweeps over the whole area of the coat. */
  passes: z.number().int().min(1).max(PASSES_MAX),
  /** minutes */
  rest: z.number().min(0).max(10_080).default(5),
  heatSet: z.object({ /** s */ seconds: z.number().min(1).max(3600), /** cm */ distance: z.number().min(5).max(100) }).nullable().default(null),
  note: z.string().trim().max(COAT_NOTE_MAX).default(''),
  /** Its link to a build-up; absent for a coat that stands by itself. */
  laidFrom: LaidFrom.optional(),
})
export type Coat = z.output<typeof Coat>
