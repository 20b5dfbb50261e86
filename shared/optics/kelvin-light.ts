import series from './data/daylight-series.json'
import type { PowerTable } from './lights'

/** Colour temperatures a light may have, kelvin: from a candle to the bluest sky the daylight series knows. */
export const KELVIN_MIN = 1800, KELVIN_MAX = 25_000

/** From here on a white light is taken for daylight, below for something that glows with heat; kelvin. */
export const DAYLIGHT_FROM = 4000

/** Second radiation constant, nm·K. @source CODATA 2018 */
const C2 = 1.438777e7

const FIRST = 380, STEP = 5, COUNT = 81

/**
 * A white light told only by its correlated colour temperature: a phase of daylight from 4000 K up, a black body below.
 *
 * The two do not meet: at 4000 K daylight is the greener. An eye used to the light hardly sees the step (CIEDE2000 below 1 on
 * the colours of paints), and no lamp is either of the two exactly.
 *
 * @param kelvin 1800…25 000
 * @throws {RangeError} when out of range
 * @source CIE 015 for daylight; M. Planck (1901) for the black body
 */
export function kelvinLight(kelvin: number): PowerTable {
  if (!(kelvin >= KELVIN_MIN && kelvin <= KELVIN_MAX)) throw new RangeError(`light: colour temperature must be from ${KELVIN_MIN} to ${KELVIN_MAX} K, got ${kelvin}`)
  return { first: FIRST, step: STEP, power: kelvin >= DAYLIGHT_FROM ? daylight(kelvin) : blackBody(kelvin) }
}

/** Chromaticity of a phase of daylight. @source CIE 015, equations of the D series, 4000…25 000 K */
export function daylightChromaticity(kelvin: number): [x: number, y: number] {
  const k = 1000 / kelvin
  const x = kelvin <= 7000
    ? -4.6070 * k ** 3 + 2.9678 * k ** 2 + 0.09911 * k + 0.244063
    : -2.0064 * k ** 3 + 1.9018 * k ** 2 + 0.24748 * k + 0.237040
  return [x, -3 * x * x + 2.870 * x - 0.275]
}

function daylight(kelvin: number): number[] {
  const [x, y] = daylightChromaticity(kelvin)
  const m = 0.0241 + 0.2562 * x - 0.7341 * y
  const m1 = (-1.3515 - 1.7703 * x + 5.9114 * y) / m, m2 = (0.0300 - 31.4424 * x + 30.0717 * y) / m
  const tens = series.s0.map((s0, i) => s0 + m1 * series.s1[i]! + m2 * series.s2[i]!)
  // Between its tens of nanometres the series is read on straight lines, as the CIE's own tables are.
  return Array.from({ length: COUNT }, (_, i) => i % 2 === 0 ? tens[i / 2]! : (tens[(i - 1) / 2]! + tens[(i + 1) / 2]!) / 2)
}

/** Power of a black body, 100 at 560 nm. */
function blackBody(kelvin: number): number[] {
  const radiance = (nm: number) => (560 / nm) ** 5 / Math.expm1(C2 / (nm * kelvin))
  return Array.from({ length: COUNT }, (_, i) => 100 * radiance(FIRST + STEP * i) / radiance(560))
}
