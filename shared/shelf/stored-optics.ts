import { z } from 'zod'

const Spectrum36 = z.array(z.number().min(0)).length(36)

/** Stored optical data of a paint: what the engine derived, under its version. Matches `PaintOptics` of the engine. */
export const StoredOptics = z.object({
  engineVersion: z.string(),
  bands: z.literal(36),
  kind: z.enum(['film', 'flake', 'clear']),
  K: Spectrum36,
  S: Spectrum36,
  flake: z.object({
    oxide: z.enum(['anatase', 'rutile', 'hematite', 'aluminium']), thickness: z.number(), flakesPerPass: z.number(), sigma: z.number(), edge: z.number(),
  }).optional(),
  fluorescent: z.object({
    peak: z.number(), width: z.number(), quantumYield: z.number(),
    /** Absorption that feeds the glow; absent from optics of engine version 1, which show none. */
    Kf: Spectrum36.optional(),
    emission: Spectrum36.optional(),
  }).optional(),
  how: z.enum(['two-swatches', 'masstone-hide', 'dye-over-white', 'interference', 'metallic', 'clear']),
  clipped: z.boolean(),
})
export type StoredOptics = z.output<typeof StoredOptics>
