import { BANDS_36 } from './bands'
import { type FreshWater, freshWaterAttenuation } from './fresh-water'

/** Jerlov's water types, clearest first: open sea I…III, coast 1C…9C. */
export const SEA_WATERS = ['I', 'IA', 'IB', 'II', 'III', '1C', '3C', '5C', '7C', '9C'] as const
/** Fresh waters. Each is our judgement of a kind, not a measured lake. */
export const FRESH_WATERS = ['clear', 'green', 'tea-stained', 'muddy'] as const
/** Every water the engine knows. */
export const WATERS = [...SEA_WATERS, ...FRESH_WATERS] as const

export type SeaWater = typeof SEA_WATERS[number]
export type FreshWaterName = typeof FRESH_WATERS[number]
export type Water = typeof WATERS[number]

/** Tells whether a word names a water the engine knows. */
export function isWater(name: unknown): name is Water {
  return WATERS.some(water => water === name)
}

const JERLOV_NM = [400, 425, 450, 475, 500, 525, 550, 575, 600, 625, 650, 675, 700] as const

/** Downward attenuation, 1/m, at `JERLOV_NM`. @source N. G. Jerlov, "Marine Optics" (1976), table XXVII */
const JERLOV: Readonly<Record<SeaWater, readonly number[]>> = {
  'I': [0.028, 0.022, 0.019, 0.018, 0.027, 0.043, 0.063, 0.089, 0.235, 0.305, 0.36, 0.42, 0.56],
  'IA': [0.038, 0.031, 0.026, 0.025, 0.032, 0.048, 0.067, 0.094, 0.24, 0.31, 0.37, 0.43, 0.57],
  'IB': [0.051, 0.042, 0.036, 0.033, 0.042, 0.054, 0.072, 0.099, 0.245, 0.315, 0.375, 0.435, 0.58],
  'II': [0.096, 0.081, 0.068, 0.062, 0.07, 0.076, 0.089, 0.115, 0.26, 0.335, 0.40, 0.465, 0.61],
  'III': [0.185, 0.16, 0.135, 0.116, 0.115, 0.116, 0.12, 0.148, 0.295, 0.375, 0.445, 0.52, 0.66],
  '1C': [0.51, 0.36, 0.25, 0.17, 0.14, 0.13, 0.12, 0.15, 0.30, 0.37, 0.45, 0.51, 0.65],
  '3C': [0.78, 0.54, 0.39, 0.29, 0.22, 0.20, 0.19, 0.21, 0.33, 0.40, 0.46, 0.56, 0.71],
  '5C': [1.1, 0.78, 0.56, 0.43, 0.36, 0.31, 0.30, 0.33, 0.40, 0.48, 0.54, 0.65, 0.80],
  '7C': [1.6, 1.2, 0.89, 0.71, 0.58, 0.49, 0.46, 0.46, 0.48, 0.54, 0.63, 0.78, 0.92],
  '9C': [2.4, 1.9, 1.6, 1.23, 0.99, 0.78, 0.63, 0.58, 0.60, 0.65, 0.76, 0.92, 1.1],
}

/** Our judgement, set so that the attenuation at 450, 550 and 650 nm is what the name leads one to expect. */
const FRESH: Readonly<Record<FreshWaterName, FreshWater>> = {
  'clear': { dissolved: 0.085, slope: 0.018, silt: 0.0052, algae: 0.077, scattering: 0.55, power: 1.1 },
  'green': { dissolved: 0.63, slope: 0.016, silt: 0.47, algae: 0.4, scattering: 3.1, power: 0.6 },
  'tea-stained': { dissolved: 6.1, slope: 0.015, silt: 0.034, algae: 0.31, scattering: 0.25, power: 0.52 },
  'muddy': { dissolved: 2.4, slope: 0.015, silt: 1.8, algae: 0.18, scattering: 21, power: 0.65 },
}

/**
 * How fast daylight dies away downwards in a water, 1/m, 36 bands.
 *
 * Jerlov's table is read on straight lines, and run on along its last two values below 400 and above 700 nm.
 */
export function waterAttenuation(water: Water): Float64Array {
  return isFresh(water) ? freshWaterAttenuation(FRESH[water]) : readJerlov(JERLOV[water])
}

function isFresh(water: Water): water is FreshWaterName {
  return FRESH_WATERS.some(name => name === water)
}

function readJerlov(values: readonly number[]): Float64Array {
  return Float64Array.from(BANDS_36, (nm) => {
    const cell = Math.min(JERLOV_NM.length - 2, Math.max(0, Math.floor((nm - 400) / 25)))
    const share = (nm - JERLOV_NM[cell]!) / 25
    return Math.max(0, values[cell]! + share * (values[cell + 1]! - values[cell]!))
  })
}
