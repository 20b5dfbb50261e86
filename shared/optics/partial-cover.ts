import { assertBands, type Spectrum } from './bands'

/** A tile of a surface: the share of the area it takes, and its reflectance as measured. */
export interface Tile { share: number, reflectance: Spectrum }

/**
 * Reflectance, from afar, of a surface of sharp-edged tiles: the mean of what the tiles show, by area.
 *
 * @param tiles shares ≥ 0 that sum to 1; reflectances as measured, equal band counts
 * @throws {RangeError} when shares do not sum to 1 or band counts differ
 * @source A. Murray, J. Franklin Inst. 221 (1936) 721–744; H. E. J. Neugebauer (1937)
 */
export function tiledReflectance(tiles: readonly Tile[]): Float64Array {
  const whole = tiles.reduce((sum, { share }) => sum + share, 0)
  if (!(Math.abs(whole - 1) < 1e-9) || tiles.some(({ share }) => !(share >= 0))) {
    throw new RangeError(`tiledReflectance: shares must be at least 0 and sum to 1, got a sum of ${whole}`)
  }
  const count = tiles[0]!.reflectance.length
  assertBands('tiledReflectance', count, ...tiles.map(tile => tile.reflectance))
  return Float64Array.from({ length: count }, (_, i) => tiles.reduce((sum, { share, reflectance }) => sum + share * reflectance[i]!, 0))
}

/**
 * Passes that land at a distance past the edge of a lifted mask; negative distances lie under the mask.
 *
 * @param passes   passes on the open side
 * @param distance mm from the edge, positive towards the open side
 * @param spread   mm, from `edgeSpread`; 0 is a sharp edge
 */
export function passesAtSoftEdge(passes: number, distance: number, spread: number): number {
  if (!(spread >= 0)) throw new RangeError(`passesAtSoftEdge: spread must be at least 0 mm, got ${spread}`)
  if (spread === 0) return distance > 0 ? passes : distance < 0 ? 0 : passes / 2
  return passes / 2 * (1 + erf(distance / (spread * Math.SQRT2)))
}

/** Spread of a soft edge, mm: how high the mask stands off, mm, times the tangent of half the spray's angle, degrees. */
export function edgeSpread(lift: number, halfAngle: number): number {
  if (!(lift >= 0)) throw new RangeError(`edgeSpread: lift must be at least 0 mm, got ${lift}`)
  if (!(halfAngle >= 0 && halfAngle < 90)) throw new RangeError(`edgeSpread: half angle must be from 0 to below 90 degrees, got ${halfAngle}`)
  return lift * Math.tan(halfAngle * Math.PI / 180)
}

/** Passes at a distance, mm, from the middle of one stroke whose bell has spread s, mm, and `passes` at its middle. */
export function passesAcrossStroke(passes: number, distance: number, spread: number): number {
  return passes * Math.exp(-(distance * distance) / (2 * spread * spread))
}

/** Strokes laid side by side: mean passes, and the ripple left, as a share of that mean (first harmonic, peak). */
export function parallelStrokes(passes: number, spread: number, pitch: number): { mean: number, ripple: number } {
  if (!(spread > 0 && pitch > 0)) throw new RangeError(`parallelStrokes: spread and pitch must be above 0 mm, got ${spread} and ${pitch}`)
  return {
    mean: passes * spread * Math.sqrt(2 * Math.PI) / pitch,
    ripple: 2 * Math.exp(-2 * (Math.PI * spread / pitch) ** 2),
  }
}

/** Open share of a hexagonal net: pitch between hole middles across the flats, and thread width, mm. */
export function openShareOfNet(pitch: number, width: number): number {
  if (!(width >= 0 && pitch > 0 && width <= pitch)) throw new RangeError(`openShareOfNet: need 0 ≤ width ≤ pitch, got ${width} and ${pitch}`)
  return ((pitch - width) / pitch) ** 2
}

/**
 * The error function.
 *
 * @accuracy within 1e-14 everywhere: its power series near 0, its continued fraction further out
 * @source Abramowitz & Stegun, 7.1.6 and 7.1.14
 */
export function erf(x: number): number {
  const size = Math.abs(x)
  if (size > 6) return Math.sign(x)
  const value = size < 2.5 ? erfSeries(size) : 1 - erfcFraction(size)
  return x < 0 ? -value : value
}

function erfSeries(x: number): number {
  let term = x, sum = x
  for (let n = 1; term > 1e-17 * sum; n++) {
    term *= 2 * x * x / (2 * n + 1)
    sum += term
  }
  return 2 / Math.sqrt(Math.PI) * Math.exp(-x * x) * sum
}

function erfcFraction(x: number): number {
  let tail = x
  for (let n = 80; n >= 1; n--) tail = x + n / 2 / tail
  return Math.exp(-x * x) / (tail * Math.sqrt(Math.PI))
}
