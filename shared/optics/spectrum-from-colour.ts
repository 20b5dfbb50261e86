import { BANDS_36, type Spectrum } from './bands'
import { type Lab, type Light, type Xyz, xyzFromLab } from './colorimetry'
import { weightsFor } from './lights'
import { solveInPlace } from './linear-system'

/** A reflectance found for a colour. */
export interface FoundSpectrum {
  /** 36 reflectances, each between 0 and 1. */
  reflectance: Float64Array
  /** False when no surface can have the colour; the spectrum is then that of the nearest paler colour of the same lightness. */
  exact: boolean
}

/** Darkest and brightest share of white that a found spectrum is asked to reach, in each of X, Y and Z. */
const DARKEST = 0.0001, BRIGHTEST = 0.999
const BAND_COUNT = BANDS_36.length
const SIZE = BAND_COUNT + 3
const STEP_MOST = 1.2

type Weights = readonly [Spectrum, Spectrum, Spectrum]

/** The calmest reflectance that has a Lab colour under a light. See `spectrumFromXyz`. */
export function spectrumFromLab(lab: Lab, light: Light = 'D65'): FoundSpectrum {
  return spectrumFromXyz(xyzFromLab(lab, light), light)
}

/**
 * The calmest reflectance that has a colour under a light: least squared slope of atanh(2R − 1), so that it stays
 * between 0 and 1 by itself and a grey comes out flat.
 *
 * @param xyz Y of white is 1; each of X, Y, Z is brought into 0.01…99.9 % of white first
 * @accuracy the colour comes back within 1e-8 CIEDE2000 for all of sRGB (tests/unit/optics/spectrum-from-colour.test.ts)
 * @source the least-slope idea: S. A. Burns, "Numerical methods for smoothest reflectance reconstruction",
 *         Color Res. Appl. 45 (2020) 8–21; solved here by Newton's method on the Karush–Kuhn–Tucker equations
 */
export function spectrumFromXyz(xyz: Xyz, light: Light = 'D65'): FoundSpectrum {
  const { x, y, z, white } = weightsFor(light)
  const held = xyz.map((value, i) => hold(value, white[i]!, DARKEST, BRIGHTEST)) as Xyz
  return nearestSolvable([x, y, z], held, white)
}

/**
 * The calmest ratio between a darker and a lighter reflectance, so that lighter × ratio has the darker colour.
 * Serves paint over black beside the same paint over white.
 *
 * @param lighter 36 reflectances
 * @param darker  X, Y and Z of the darker colour under the light
 */
export function ratioFromXyz(lighter: Spectrum, darker: Xyz, light: Light = 'D65'): FoundSpectrum {
  const weights = weightsFor(light)
  const seen = [weights.x, weights.y, weights.z].map(w => w.map((value, i) => value * lighter[i]!)) as [Float64Array, Float64Array, Float64Array]
  const whole = seen.map(w => w.reduce((sum, value) => sum + value, 0)) as Xyz
  const held = darker.map((value, i) => hold(value, whole[i]!, 1e-4, 0.9998)) as Xyz
  const found = nearestSolvable(seen, held, whole)
  const wasHeld = held.some((value, i) => Math.abs(value - darker[i]!) > 1e-6 * whole[i]!)
  return { reflectance: found.reflectance, exact: found.exact && !wasHeld }
}

function hold(value: number, white: number, low: number, high: number): number {
  return Math.min(high * white, Math.max(low * white, value))
}

/** Solves for the colour itself or, when no surface has it, for the nearest colour on the straight way to grey. */
function nearestSolvable(weights: Weights, xyz: Xyz, white: Xyz): FoundSpectrum {
  const exact = solve(weights, xyz, white)
  if (exact) return { reflectance: exact, exact: true }
  const Y = xyz[1] / white[1]
  const paler = (share: number) => xyz.map((value, i) => value * share + Y * white[i]! * (1 - share)) as Xyz
  let reflectance = new Float64Array(BAND_COUNT).fill(Y)
  let low = 0, high = 1
  for (let i = 0; i < 12; i++) {
    const share = (low + high) / 2
    const found = solve(weights, paler(share), white)
    if (found) {
      reflectance = found
      low = share
    }
    else {
      high = share
    }
  }
  return { reflectance, exact: false }
}

/** Newton's method on the conditions for a least slope that meets the colour; undefined when it does not settle. */
function solve(weights: Weights, xyz: Xyz, white: Xyz): Float64Array<ArrayBuffer> | undefined {
  const z = new Float64Array(BAND_COUNT).fill(Math.atanh(2 * xyz[1] / white[1] - 1))
  const pull = [0, 0, 0]
  const matrix = new Float64Array(SIZE * SIZE), right = new Float64Array(SIZE)

  for (let round = 0; round < 80; round++) {
    const miss = writeEquations(weights, xyz, z, pull, matrix, right)
    if (!solveInPlace(matrix, right, SIZE)) return undefined
    let step = 0
    for (let i = 0; i < BAND_COUNT; i++) step = Math.max(step, Math.abs(right[i]!))
    if (!(step < 1e6)) return undefined
    const share = step > STEP_MOST ? STEP_MOST / step : 1
    for (let i = 0; i < BAND_COUNT; i++) z[i]! += share * right[i]!
    for (let c = 0; c < 3; c++) pull[c] = pull[c]! + share * (right[BAND_COUNT + c]! - pull[c]!)
    if (step < 1e-7 && miss < 1e-10) return z.map(value => (1 + Math.tanh(value)) / 2)
  }
  return undefined
}

/** Fills in the linear equations of one step; returns how far the colour is off before it. */
function writeEquations(weights: Weights, xyz: Xyz, z: Float64Array, pull: number[], matrix: Float64Array, right: Float64Array): number {
  matrix.fill(0)
  const got = [0, 0, 0]
  for (let i = 0; i < BAND_COUNT; i++) {
    const t = Math.tanh(z[i]!), slope = (1 - t * t) / 2
    let bend = 0
    for (let c = 0; c < 3; c++) {
      const weight = weights[c]![i]!
      got[c]! += weight * (1 + t) / 2
      bend += pull[c]! * weight
      matrix[i * SIZE + BAND_COUNT + c] = matrix[(BAND_COUNT + c) * SIZE + i] = weight * slope
    }
    const before = i > 0 ? z[i]! - z[i - 1]! : 0
    const after = i < BAND_COUNT - 1 ? z[i]! - z[i + 1]! : 0
    right[i] = -(before + after)
    matrix[i * SIZE + i] = (i > 0 ? 1 : 0) + (i < BAND_COUNT - 1 ? 1 : 0) - 2 * bend * t * slope
    if (i > 0) matrix[i * SIZE + i - 1] = matrix[(i - 1) * SIZE + i] = -1
  }
  let miss = 0
  for (let c = 0; c < 3; c++) {
    right[BAND_COUNT + c] = xyz[c]! - got[c]!
    miss = Math.max(miss, Math.abs(xyz[c]! - got[c]!))
  }
  return miss
}
