import { z } from 'zod'
import { PaintBase, PaintKind, TwoPart } from '#shared/shelf/paint'
import { StoredOptics } from '#shared/shelf/stored-optics'
import { BlankShape } from '#shared/blank/blank-shape'

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
  twoPart: TwoPart.optional(),
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
