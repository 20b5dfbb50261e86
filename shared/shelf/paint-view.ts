import { z } from 'zod'
import { PaintDraft } from './paint'
import { StoredOptics } from '#shared/shelf/stored-optics'

const Srgb = z.string().regex(/^#[0-9a-f]{6}$/)

/** How sure a swatch's colour is: half of all swatches sprayed so lie within `typical` of it, nineteen in twenty within `most`, CIEDE2000. */
export const SwatchSpread = z.object({ typical: z.number(), most: z.number() })
export type SwatchSpread = z.output<typeof SwatchSpread>

/** How a paint looks by itself: what a swatch shows. */
export const PaintSwatches = z.object({
  /** Many passes: its own colour. */
  masstone: Srgb,
  /** Two passes over black and over white. */
  overBlack: Srgb,
  overWhite: Srgb,
  /** A flake seen into the light and away from it, over black. */
  face: Srgb.optional(),
  flop: Srgb.optional(),
  /** Its own colour in words. */
  words: z.string(),
  /** CIELAB of the masstone (of the face, for a flake), D65. */
  lab: z.tuple([z.number(), z.number(), z.number()]),
  /** How sure the two swatches are, at two passes by hand. */
  sure: z.object({ overBlack: SwatchSpread, overWhite: SwatchSpread }).optional(),
  /** A screen cannot show its own colour and draws it paler. */
  unshown: z.boolean().optional(),
})
export type PaintSwatches = z.output<typeof PaintSwatches>

/** How far the prediction of this paint can be trusted, by how its colour is known: 3 best. */
export const PaintTrust = z.object({ level: z.union([z.literal(1), z.literal(2), z.literal(3)]), words: z.string() })
export type PaintTrust = z.output<typeof PaintTrust>

/** A paint as it travels to those who may read the shelf. The price goes only to those who may see cost. */
export const PaintView = PaintDraft.extend({
  id: z.uuid(),
  opticsId: z.uuid(),
  optics: StoredOptics,
  swatches: PaintSwatches,
  trust: PaintTrust,
  retired: z.boolean(),
  version: z.number().int(),
  changedAt: z.iso.datetime(),
})
export type PaintView = z.output<typeof PaintView>

/** A row of the shelf: a paint without its spectra. */
export const PaintListItem = PaintView.omit({ optics: true, note: true }).extend({
  schemes: z.number().int(),
  /** Bottles of it in use: retired ones do not count. */
  bottles: z.number().int(),
})
export type PaintListItem = z.output<typeof PaintListItem>

/** Where a paint is used. */
export const PaintUse = z.object({ schemeId: z.uuid(), name: z.string() })
export type PaintUse = z.output<typeof PaintUse>

export const PaintParams = z.object({ paintId: z.uuid() })
export const PaintChange = PaintDraft.extend({ retired: z.boolean().optional() })
export type PaintChange = z.output<typeof PaintChange>
