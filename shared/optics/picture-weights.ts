import { BANDS_36 } from './bands'
import { solveInPlace } from './linear-system'
import { type BandRows, lampNamed } from './light-power'
import type { Light } from './lights'
import { adaptToDaylight, linearFromXyz } from './screen-colour'
import { PICTURE_LINEAR_WEIGHTS, PICTURE_XYZ_WEIGHTS, toPictureBands } from './to-picture-bands'

/** How strongly weights are held back from swinging where the lessons do not tell them apart. */
const CALM = 3e-6

/** Steps, bells and notches across the spectrum: what coats of paint look like, and harder. */
function lessons(): Float64Array[] {
  const spectra: Float64Array[] = []
  for (let middle = 390; middle <= 730; middle += 10) {
    for (const width of [8, 16, 32, 64]) {
      const bell = (nm: number) => Math.exp(-(((nm - middle) / (2 * width)) ** 2))
      const step = (nm: number) => 1 / (1 + Math.exp((middle - nm) / width))
      for (const shape of [bell, step, (nm: number) => 1 - bell(nm), (nm: number) => 1 - step(nm)]) {
        spectra.push(Float64Array.from(BANDS_36, nm => 0.03 + 0.9 * shape(nm)))
      }
    }
  }
  return spectra
}

/**
 * X, Y and Z of each picture band under a light: 16 weights for X, then Y, then Z. Daylight's were fitted with the bands;
 * other lights are fitted here by least squares, and a grey stays exactly grey.
 *
 * @accuracy against the 36 bands, on random stacks: half within CIEDE2000 0.15, 95 in 100 within 0.6; the worst of the hardest
 *           draws 1.5 under D65, A and F11, and 2.1 under the LED lights, whose blue peak is narrow
 */
export function pictureXyzWeights(light: Light): Float64Array {
  return light === 'D65' ? Float64Array.from(PICTURE_XYZ_WEIGHTS) : fitPictureWeights(lampNamed(light).weights)
}

/**
 * Weights of the 16 picture bands that come nearest to given weights of the 36, for any light and any filter: fitted by least
 * squares over spectra like those of paint. 16 for X, then Y, then Z; a grey stays exactly what it is by the 36.
 */
export function fitPictureWeights({ x, y, z }: BandRows): Float64Array {
  const { exact, short, normal } = LESSONS
  const answer = new Float64Array(48)
  for (const [row, weights] of [x, y, z].entries()) {
    const white = total(weights)
    const first = answer.subarray(16 * row, 16 * row + 16)
    first.set(shareOut(weights))
    const rest = exact.map((spectrum, s) => dot(weights, spectrum) - dot(first, short[s]!))
    correction(normal, short, rest).forEach((value, i) => first[i]! += value)
    const reached = total(first)
    for (let i = 0; i < 16; i++) first[i]! *= reached > 0 ? white / reached : 0
  }
  return answer
}

const LESSONS = learn(lessons())

/** The lessons in both sets of bands, and the least-squares matrix that all lights share. */
function learn(exact: Float64Array[]): { exact: Float64Array[], short: Float64Array[], normal: Float64Array } {
  const short = exact.map(spectrum => toPictureBands(spectrum))
  const normal = new Float64Array(256)
  for (const spectrum of short) {
    for (let i = 0; i < 16; i++) for (let j = 0; j < 16; j++) normal[16 * i + j]! += spectrum[i]! * spectrum[j]!
  }
  for (let i = 0; i < 16; i++) normal[17 * i]! += CALM * short.length
  return { exact, short, normal }
}

/**
 * Linear sRGB of each picture band under a light, for an eye used to it: 16 weights for red, then green, then blue.
 * Work them out once per light, not per pixel.
 */
export function pictureLinearWeights(light: Light): Float64Array {
  if (light === 'D65') return Float64Array.from(PICTURE_LINEAR_WEIGHTS)
  const xyz = pictureXyzWeights(light)
  const answer = new Float64Array(48)
  for (let band = 0; band < 16; band++) {
    const rgb = linearFromXyz(adaptToDaylight([xyz[band]!, xyz[16 + band]!, xyz[32 + band]!], light))
    rgb.forEach((value, channel) => answer[16 * channel + band] = value)
  }
  return answer
}

/** Gives each exact band's weight to the two picture bands beside it. */
function shareOut(weights: Float64Array): Float64Array {
  const answer = new Float64Array(16)
  const unit = new Float64Array(36)
  for (let band = 0; band < 36; band++) {
    unit.fill(0)
    unit[band] = 1
    const seen = toPictureBands(unit)
    const whole = seen.reduce((sum, value) => sum + value, 0)
    if (whole > 0) seen.forEach((value, i) => answer[i]! += weights[band]! * value / whole)
  }
  return answer
}

/** The small change of weights that leaves the least squared rest. */
function correction(normal: Float64Array, short: Float64Array[], rest: number[]): Float64Array {
  const right = new Float64Array(16)
  short.forEach((spectrum, s) => {
    for (let i = 0; i < 16; i++) right[i]! += spectrum[i]! * rest[s]!
  })
  return solveInPlace(normal.slice(), right, 16) ? right : new Float64Array(16)
}

function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!
  return sum
}

function total(values: ArrayLike<number>): number {
  let sum = 0
  for (let i = 0; i < values.length; i++) sum += values[i]!
  return sum
}
