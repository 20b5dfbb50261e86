import type { PaintSnapshot } from '#shared/scheme/materials'
import { type Caution, cautionFor, HAZARDS, type HazardCode } from '#shared/shelf/hazards'

type Cup = readonly Pick<PaintSnapshot, 'base' | 'hazards'>[]

/** For heat-setting. Common practice: foam bodies soften from about 43 °C, and a heat gun blisters acrylic; solvents near heat burn. */
export const HEAT_CAUTION: Caution = {
  headline: 'Heat: keep it moving, no solvent near',
  body: 'Stay below what the body bears: some foams soften from 43 °C, and air in a hollow body swells. No heat near open solvent or its vapour.',
  pictograms: ['GHS02'],
  statements: [],
}

const GLUE_HAZARDS: readonly HazardCode[] = ['H315', 'H319', 'H335']

/** For eyes, which are mostly set in instant glue (common practice; usual statements of cyanoacrylates). */
export const GLUE_CAUTION: Caution = {
  headline: 'Instant glue: air moving, face back',
  body: 'Its vapour irritates eyes and airways and it bonds skin at once. Keep it off paper towels, where a spill heats up.',
  pictograms: ['GHS07'],
  statements: GLUE_HAZARDS.map(code => `${code} ${HAZARDS[code].text}`),
}

/** Before anything is opened: for everything this run will open, the gravest first. */
export function prepareCaution(paints: Cup): Caution | null {
  return cautionFor(paints)
}

/** While something rests or turns: only what still gives off what harms; water-based paint does not. */
export function restCaution(cup: Cup): Caution | null {
  return cup.some(paint => paint.base !== 'water') ? cautionFor(cup) : null
}
