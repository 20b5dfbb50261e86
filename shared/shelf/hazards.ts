import type { PaintBase } from './paint'

/** The GHS pictograms this trade meets, by their UN number. */
export type Pictogram = 'GHS02' | 'GHS04' | 'GHS05' | 'GHS07' | 'GHS08' | 'GHS09'

interface Hazard { text: string, pictogram: Pictogram }

/**
 * GHS hazard statements the shelf offers, word for word.
 * Source: United Nations, Globally Harmonized System of Classification and Labelling of Chemicals, annex 3 (read in public code tables).
 */
export const HAZARDS = {
  H222: { text: 'Extremely flammable aerosol', pictogram: 'GHS02' },
  H225: { text: 'Highly flammable liquid and vapour', pictogram: 'GHS02' },
  H226: { text: 'Flammable liquid and vapour', pictogram: 'GHS02' },
  H229: { text: 'Pressurized container: may burst if heated', pictogram: 'GHS04' },
  H302: { text: 'Harmful if swallowed', pictogram: 'GHS07' },
  H304: { text: 'May be fatal if swallowed and enters airways', pictogram: 'GHS08' },
  H312: { text: 'Harmful in contact with skin', pictogram: 'GHS07' },
  H314: { text: 'Causes severe skin burns and eye damage', pictogram: 'GHS05' },
  H315: { text: 'Causes skin irritation', pictogram: 'GHS07' },
  H317: { text: 'May cause an allergic skin reaction', pictogram: 'GHS07' },
  H318: { text: 'Causes serious eye damage', pictogram: 'GHS05' },
  H319: { text: 'Causes serious eye irritation', pictogram: 'GHS07' },
  H332: { text: 'Harmful if inhaled', pictogram: 'GHS07' },
  H334: { text: 'May cause allergy or asthma symptoms or breathing difficulties if inhaled', pictogram: 'GHS08' },
  H335: { text: 'May cause respiratory irritation', pictogram: 'GHS07' },
  H336: { text: 'May cause drowsiness or dizziness', pictogram: 'GHS07' },
  H350: { text: 'May cause cancer', pictogram: 'GHS08' },
  H351: { text: 'Suspected of causing cancer', pictogram: 'GHS08' },
  H360: { text: 'May damage fertility or the unborn child', pictogram: 'GHS08' },
  H361: { text: 'Suspected of damaging fertility or the unborn child', pictogram: 'GHS08' },
  H372: { text: 'Causes damage to organs through prolonged or repeated exposure', pictogram: 'GHS08' },
  H373: { text: 'May cause damage to organs through prolonged or repeated exposure', pictogram: 'GHS08' },
  H410: { text: 'Very toxic to aquatic life with long lasting effects', pictogram: 'GHS09' },
  H411: { text: 'Toxic to aquatic life with long lasting effects', pictogram: 'GHS09' },
  H412: { text: 'Harmful to aquatic life with long lasting effects', pictogram: 'GHS09' },
} as const satisfies Record<string, Hazard>

export type HazardCode = keyof typeof HAZARDS

/** A caution as it is shown at the step where it applies. */
export interface Caution {
  /** What to do first. */
  headline: string
  /** Why, in a sentence. */
  body: string
  pictograms: Pictogram[]
  /** The statements that apply, `H317 May cause an allergic skin reaction`. */
  statements: string[]
}

/** Ends every caution: whose word comes first. */
export const CAUTION_DEFERS = 'The maker’s safety data sheet, local codes and licensed practice come first. This is a caution, not permission.'

/** What to do first with each kind of carrier in the cup (common practice; HSE guidance on isocyanate paint spraying for the two-part clears). */
const FIRST: Readonly<Record<PaintBase, { headline: string, body: string, pictogram: Pictogram }>> = {
  'water': {
    headline: 'Spray mist in the air: fan on, mask on', pictogram: 'GHS07',
    body: 'Water-based paint is still pigment and binder in the lungs. Spray in a booth or at an extractor, with a filter made for mist.',
  },
  'solvent': {
    headline: 'Solvent vapour: air moving, no flame, no heater', pictogram: 'GHS02',
    body: 'Vapour burns and dulls the mind. No torch, spark or heat gun near; a vapour filter, and a booth made for solvents.',
  },
  'epoxy': {
    headline: 'Epoxy: thick nitrile gloves, nothing on skin', pictogram: 'GHS07',
    body: 'Uncured resin and hardener can cause a lasting allergy, also through the air. Change gloves often; a large mix can run hot.',
  },
  'uv-resin': {
    headline: 'UV resin: nitrile gloves, glasses for the lamp', pictogram: 'GHS07',
    body: 'Uncured acrylate can cause a lasting allergy and latex does not stop it. Do not look into the lamp; cure waste before it goes out.',
  },
  'moisture-cure': {
    headline: 'Isocyanate in this clear: not without air-fed breathing kit', pictogram: 'GHS08',
    body: 'Isocyanates cause asthma, also in people who only stand near. Booth, measured clearance time, nobody else in the room.',
  },
  'two-part-urethane': {
    headline: 'Isocyanate in this clear: not without air-fed breathing kit', pictogram: 'GHS08',
    body: 'Isocyanates cause asthma, also in people who only stand near. Booth, measured clearance time, nobody else in the room.',
  },
}

/** The caution for what is in the cup: from its carriers and its hazard statements, the gravest carrier speaking first. */
export function cautionFor(inTheCup: readonly { base: PaintBase, hazards: readonly string[] }[]): Caution | null {
  const gravest = (['moisture-cure', 'two-part-urethane', 'solvent', 'epoxy', 'uv-resin', 'water'] as const)
    .find(base => inTheCup.some(paint => paint.base === base))
  if (!gravest) return null
  const codes = [...new Set(inTheCup.flatMap(paint => paint.hazards))].filter((code): code is HazardCode => code in HAZARDS).sort()
  const first = FIRST[gravest]
  return {
    headline: first.headline,
    body: first.body,
    pictograms: [...new Set<Pictogram>([first.pictogram, ...codes.map(code => HAZARDS[code].pictogram)])],
    statements: codes.map(code => `${code} ${HAZARDS[code].text}`),
  }
}
