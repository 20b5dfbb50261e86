import { assertBands, assertWithin, BANDS_36, type Spectrum } from './bands'

/** Light a fluorescent gives off, and the light it takes for that. Plain data: it is stored with its paint. */
export interface Fluorescence {
  /** Middle of the light given off, nm. */
  peak: number
  /** Width of that light at half its height, nm. */
  width: number
  /** Photons out for each photon taken, 0…1. */
  quantumYield: number
  /**
   * Absorption per pass that feeds the glow, 36 bands, never above K of the paint. Without it a paint does not glow: that is
   * how optics of engine version 1 keep the look they had.
   */
  Kf?: number[]
  /** Photons given off in each of the 36 bands, where they were measured; the bell of `peak` and `width` otherwise. */
  emission?: number[]
}

/** A fluorescence that glows: its absorption is known. */
export type Glow = Fluorescence & { Kf: number[] }

/** The glow of a paint, when it has one. */
export function glowOf(paint: { fluorescent?: Fluorescence | undefined }): Glow | undefined {
  const { fluorescent } = paint
  return fluorescent?.Kf && fluorescent.quantumYield > 0 ? { ...fluorescent, Kf: fluorescent.Kf } : undefined
}

/**
 * Photons given off in each of the 36 bands, summing to 1.
 *
 * A dye gives off the same bell whatever light it took (common practice: Kasha's rule), so excitation and emission separate.
 *
 * @throws {RangeError} when the bell or the spectrum is out of range, or empty
 */
export function emissionPhotons({ peak, width, emission }: Pick<Fluorescence, 'peak' | 'width' | 'emission'>): Float64Array {
  const shape = emission ? measured(emission) : bell(peak, width)
  const whole = shape.reduce((sum, value) => sum + value, 0)
  if (!(whole > 0)) throw new RangeError('fluorescent: the emission must be above 0 in some band')
  return shape.map(value => value / whole)
}

function measured(emission: readonly number[]): Float64Array {
  assertBands('fluorescent', BANDS_36.length, emission)
  assertWithin('fluorescent', 'the emission', 0, Number.MAX_VALUE, emission)
  return Float64Array.from(emission)
}

function bell(peak: number, width: number): Float64Array {
  assertWithin('fluorescent', 'the emission peak', 380, 730, [peak])
  assertWithin('fluorescent', 'the emission width', 5, 400, [width])
  return Float64Array.from(BANDS_36, nm => Math.exp(-4 * Math.LN2 * ((nm - peak) / width) ** 2))
}

/**
 * How much of a dye's absorption feeds its glow, 36 bands: all of it up to where the emission begins, none past its peak.
 *
 * A colour over white does not tell the two apart, so this is our choice: light of longer waves than the emission lacks the
 * energy, and what a paint still takes there (a shading dye, dirt) only darkens. Between, a smooth step whose middle lies
 * half a width before the peak; the shift between a dye's absorption and its emission is of that order (20–40 nm, from memory).
 */
export function glowAbsorption(K: Spectrum, { peak, width }: Pick<Fluorescence, 'peak' | 'width'>): number[] {
  assertBands('glowAbsorption', BANDS_36.length, K)
  const middle = peak - width / 2, softness = width / 10
  return BANDS_36.map((nm, i) => K[i]! / (1 + Math.exp((nm - middle) / softness)))
}
