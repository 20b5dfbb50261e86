import optimised from './data/optimised-bands.json'

/** Middle wavelengths of the 36 exact bands, nm: 380 to 730 by 10. Everything that is stored or matched uses these. */
export const BANDS_36: readonly number[] = Array.from({ length: 36 }, (_, i) => 380 + 10 * i)

/** Wavelengths of the 16 bands that pictures are computed in, nm. Chosen with their weights (`data/optimised-bands.json`). */
export const BANDS_16: readonly number[] = optimised.nodes

/** Which set of bands a spectrum is written in: the exact one, or the short one for pictures. */
export type Bands = 'exact36' | 'picture16'

/** One value per band. Plain arrays are what is stored; typed arrays are what is computed with. */
export type Spectrum = ArrayLike<number>

/** Wavelengths of a set of bands, nm. */
export function wavelengthsOf(bands: Bands): readonly number[] {
  return bands === 'exact36' ? BANDS_36 : BANDS_16
}

/**
 * Refuses spectra that are not of the expected length.
 *
 * @throws {RangeError} naming the function, the length that was expected and the length that came
 */
export function assertBands(where: string, expected: number, ...spectra: Spectrum[]): void {
  for (const spectrum of spectra) {
    if (spectrum.length !== expected) throw new RangeError(`${where}: expected ${expected} bands, got ${spectrum.length}`)
  }
}

/**
 * Refuses spectra with a value outside a range, NaN included.
 *
 * @throws {RangeError} naming the function, the quantity and the value
 */
export function assertWithin(where: string, what: string, low: number, high: number, spectrum: Spectrum): void {
  for (let i = 0; i < spectrum.length; i++) {
    const value = spectrum[i]!
    if (!(value >= low && value <= high)) throw new RangeError(`${where}: ${what} must be ${rangeInWords(low, high)}, got ${value}`)
  }
}

function rangeInWords(low: number, high: number): string {
  return high >= Number.MAX_VALUE ? `at least ${low}` : `from ${low} to ${high}`
}
