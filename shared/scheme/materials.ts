import { z } from 'zod'
import { PaintBase, PaintKind } from '#shared/shelf/paint'
import { BlankShape } from '#shared/blank/blank-shape'

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
  fluorescent: z.object({ peak: z.number(), width: z.number(), quantumYield: z.number() }).optional(),
  how: z.enum(['two-swatches', 'masstone-hide', 'dye-over-white', 'interference', 'metallic', 'clear']),
  clipped: z.boolean(),
})
export type StoredOptics = z.output<typeof StoredOptics>

/** A paint as a scheme knows it: enough to show, lay and caution, and its optical data for good. */
export const PaintSnapshot = z.object({
  id: z.uuid(),
  name: z.string(),
  kind: PaintKind,
  base: PaintBase,
  reducerPer100: z.number(),
  filmPerPass: z.number(),
  volumeSolids: z.number(),
  density: z.number(),
  potLifeMinutes: z.number().optional(),
  hazards: z.array(z.string()),
  opticsId: z.uuid(),
  optics: StoredOptics,
})
export type PaintSnapshot = z.output<typeof PaintSnapshot>

/** What a scheme is made with. A revision freezes it, so that a later change of a paint or a blank repaints nothing. */
export const Materials = z.object({
  paints: z.array(PaintSnapshot),
  blank: z.object({ id: z.uuid(), shape: BlankShape }),
})
export type Materials = z.output<typeof Materials>
