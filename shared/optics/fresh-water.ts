import { BANDS_36 } from './bands'

/** What is in a fresh water besides water, 1/m. */
export interface FreshWater {
  /** Absorption at 440 nm of what is dissolved (tannin, humus), and how fast it falls off, 1/nm. */
  dissolved: number
  slope: number
  /** Absorption at 440 nm of silt and dead matter. */
  silt: number
  /** Absorption at 440 nm of living algae. */
  algae: number
  /** Scattering at 550 nm of all particles, and the power of wavelength it falls with. */
  scattering: number
  power: number
}

/** Cosine of the light on its way down, within the 0.85…0.98 the equation was made for; and molecules' part of scattering. */
const COSINE = 0.9, MOLECULES = 0.018
/** Fall of silt's absorption, 1/nm, and scattering of pure water at 550 nm, 1/m. From memory. */
const SILT_SLOPE = 0.011, WATER_SCATTERING = 0.00193

/**
 * Absorption of pure water, 1/m, 380…730 nm by 10.
 *
 * @source R. M. Pope, E. S. Fry, Appl. Opt. 36 (1997) 8710–8723; values between each second, below 400 and above 700 nm from memory
 */
export const PURE_WATER: readonly number[] = [
  0.01137, 0.00851, 0.00663, 0.00473, 0.00454, 0.00495, 0.00635, 0.00922, 0.00979, 0.0106, 0.0127, 0.0150,
  0.0204, 0.0325, 0.0409, 0.0434, 0.0474, 0.0565, 0.0619, 0.0695, 0.0896, 0.1351, 0.2224, 0.2644,
  0.2755, 0.2916, 0.3108, 0.340, 0.410, 0.439, 0.465, 0.516, 0.624, 0.827, 1.231, 1.799,
]

/**
 * How fast daylight dies away downwards in a fresh water, 1/m, 36 bands.
 *
 * @source M. G. Solonenko, C. D. Mobley, Appl. Opt. 54 (2015) 5392–5401, equation 3; the shapes of silt and algae are usual ones
 *         (common practice), drawn by us
 */
export function freshWaterAttenuation({ dissolved, slope, silt, algae, scattering, power }: FreshWater): Float64Array {
  return Float64Array.from(BANDS_36, (nm, i) => {
    const a = PURE_WATER[i]! + dissolved * Math.exp(-slope * (nm - 440)) + silt * Math.exp(-SILT_SLOPE * (nm - 440)) + algae * algaeShape(nm)
    const b = WATER_SCATTERING * (550 / nm) ** 4.32 + scattering * (550 / nm) ** power
    const turned = (0.451 + 2.584 * MOLECULES) * COSINE - (0.205 + 0.521 * MOLECULES)
    return a / COSINE * Math.sqrt(1 + b / a * turned)
  })
}

/** Chlorophyll's two bands and the pigments between them. */
function algaeShape(nm: number): number {
  const bell = (middle: number, width: number) => Math.exp(-(((nm - middle) / width) ** 2))
  return bell(440, 45) + 0.45 * bell(675, 18) + 0.15 * bell(600, 70)
}
