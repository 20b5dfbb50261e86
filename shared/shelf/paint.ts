import { z } from 'zod'

export const PAINT_NAME_MAX = 80
export const PAINT_NOTE_MAX = 2000

/** How a paint behaves in a film, in the trade's words. */
export const PAINT_KINDS = [
  'sealer', 'primer', 'opaque', 'semi-opaque', 'transparent', 'candy', 'pearl', 'interference', 'metallic', 'fluorescent', 'clear',
] as const
export const PaintKind = z.enum(PAINT_KINDS)
export type PaintKind = z.output<typeof PaintKind>

/** What carries the paint; decides cautions and what may go over what. */
export const PAINT_BASES = ['water', 'solvent', 'epoxy', 'uv-resin', 'moisture-cure', 'two-part-urethane'] as const
export const PaintBase = z.enum(PAINT_BASES)
export type PaintBase = z.output<typeof PaintBase>

/** CIELAB, D65, 2° observer. */
export const Lab = z.tuple([z.number().min(0).max(130), z.number().min(-150).max(150), z.number().min(-150).max(150)])
export type Lab = z.output<typeof Lab>

const Passes = z.number().positive().max(50)

/** What is known of a paint's colour, best first. */
export const PaintKnown = z.discriminatedUnion('how', [
  z.object({
    how: z.literal('two-swatches'), overBlack: Lab, overWhite: Lab, passes: Passes,
    blackGround: Lab.optional(), whiteGround: Lab.optional(),
  }),
  z.object({ how: z.literal('masstone-hide'), masstone: Lab, passesToHide: Passes }),
  z.object({ how: z.literal('dye-over-white'), overWhite: Lab, passes: Passes, haze: z.number().min(0).max(0.5).default(0) }),
  z.object({
    how: z.literal('flake'),
    oxide: z.enum(['anatase', 'rutile', 'hematite', 'aluminium']),
    /** Oxide thickness, nm; not asked of aluminium, nor where the wanted face is told. */
    thickness: z.number().min(20).max(250).optional(),
    /** Colour the face should have: the engine finds the thickness of the same hue. */
    wanted: Lab.optional(),
    /** Mean flakes over a point, per pass. */
    flakesPerPass: z.number().positive().max(3),
    /** Spread of the flakes' tilt, degrees. */
    sigma: z.number().min(2).max(30),
    /** Share of the light that flake edges scatter. */
    edge: z.number().min(0).max(0.5),
    /** A dye in the same bottle, its colour over white at so many passes. */
    tint: z.object({ overWhite: Lab, passes: Passes }).optional(),
  }),
  z.object({
    how: z.literal('fluorescent'), overWhite: Lab, passes: Passes, haze: z.number().min(0).max(0.5).default(0),
    emissionPeak: z.number().min(420).max(700), emissionWidth: z.number().min(10).max(150), quantumYield: z.number().min(0).max(1),
  }),
  z.object({ how: z.literal('clear'), yellowing: z.number().min(0).max(1).default(0) }),
])
export type PaintKnown = z.output<typeof PaintKnown>

/** GHS hazard statements the shelf knows, by code. Their texts stand in `hazards.ts`. */
export const HazardCode = z.string().regex(/^H\d{3}$/)

const Density = z.number().min(0.5).max(3)
const Parts = z.number().positive().max(1000)

/** What is mixed with a hardener before it is laid: the ratio on its label, and how heavy both parts are where that is known. */
export const TwoPart = z.object({
  /** Volume is not weight: 2 to 1 in the cup can be 100 to 44 on the scale. */
  by: z.enum(['volume', 'weight']),
  resin: Parts,
  hardener: Parts,
  /** g/mL. */
  resinDensity: Density.optional(),
  hardenerDensity: Density.optional(),
})
export type TwoPart = z.output<typeof TwoPart>

/** What a person writes about a paint. */
export const PaintDraft = z.object({
  name: z.string().trim().min(1).max(PAINT_NAME_MAX),
  kind: PaintKind,
  base: PaintBase,
  known: PaintKnown,
  /** Parts of reducer to 100 parts of paint by volume, as usually sprayed. */
  reducerPer100: z.number().min(0).max(400).default(0),
  /** Dry film of one pass as usually sprayed, µm (planning value). */
  filmPerPass: z.number().positive().max(400).default(4),
  /** Volume solids of the paint as bought, percent. */
  volumeSolids: z.number().min(1).max(100).default(25),
  /** Density, g/mL. */
  density: Density.default(1.05),
  restMinutes: z.number().min(0).max(2880).default(5),
  /** Mixed working time at 25 °C, minutes; absent for what does not set in the cup. */
  potLifeMinutes: z.number().positive().max(1440).optional(),
  /** Resin and hardener; absent for what comes ready to lay. */
  twoPart: TwoPart.optional(),
  hazards: z.array(HazardCode).max(20).default([]),
  note: z.string().trim().max(PAINT_NOTE_MAX).default(''),
  /** What is left, mL. */
  volumeLeft: z.number().min(0).max(100_000).default(0),
  /** Price of one mL in the workshop's currency. */
  pricePerMl: z.number().min(0).max(1000).optional(),
})
export type PaintDraft = z.output<typeof PaintDraft>
