import type { FilmColour } from './coat-search'
import type { Lab } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { solveInPlace } from './linear-system'
import type { Spectrum } from './bands'

/** A film by its absorption and scattering per pass. */
export interface Film { K: Spectrum, S: Spectrum }

const ROUNDS = 5
/** Passes of each paint that the search starts from. */
const STARTS = [0.4, 2]
const SMALLEST = 1e-3
/** Step of the slope, and the most one round may change an amount, in its logarithm. */
const NUDGE = 1e-3, STRIDE = 1.5

/**
 * How near some paints can come to a colour in one cup if drops could be cut: Gauss–Newton on the amounts of each, in their
 * logarithms so that none goes below nothing.
 *
 * @returns CIEDE2000 of the nearest found; a screen, not a promise
 */
export function nearestUncut(films: readonly Film[], colour: FilmColour, target: Lab, passesMost: number): number {
  return Math.min(...STARTS.map(start => descend(films, colour, target, passesMost, start)))
}

function descend(films: readonly Film[], colour: FilmColour, target: Lab, passesMost: number, start: number): number {
  const count = films.length
  const amounts = new Float64Array(count).fill(Math.log(start))
  const K = new Float64Array(36), S = new Float64Array(36)
  const labOf = (logs: Float64Array): Lab => {
    K.fill(0)
    S.fill(0)
    films.forEach((film, f) => {
      const passes = Math.exp(logs[f]!)
      for (let i = 0; i < 36; i++) {
        K[i]! += passes * film.K[i]!
        S[i]! += passes * film.S[i]!
      }
    })
    return colour(K, S, 1)
  }
  let lab = labOf(amounts)
  let least = deltaE2000(lab, target)
  for (let round = 0; round < ROUNDS; round++) {
    const slopes = films.map((_, f) => {
      const moved = Float64Array.from(amounts)
      moved[f]! += NUDGE
      return labOf(moved).map((value, c) => (value - lab[c]!) / NUDGE)
    })
    const step = leastSquares(slopes, target.map((value, c) => value - lab[c]!), count)
    if (!step) break
    for (let f = 0; f < count; f++) {
      const moved = amounts[f]! + Math.max(-STRIDE, Math.min(STRIDE, step[f]!))
      amounts[f] = Math.max(Math.log(SMALLEST), Math.min(Math.log(passesMost), moved))
    }
    lab = labOf(amounts)
    least = Math.min(least, deltaE2000(lab, target))
  }
  return least
}

/** The step that brings the colour nearest, a little held back where paints do the same. */
function leastSquares(slopes: readonly number[][], rest: readonly number[], count: number): Float64Array | undefined {
  const matrix = new Float64Array(count * count), right = new Float64Array(count)
  for (let f = 0; f < count; f++) {
    for (let c = 0; c < 3; c++) right[f]! += slopes[f]![c]! * rest[c]!
    for (let g = 0; g < count; g++) for (let c = 0; c < 3; c++) matrix[f * count + g]! += slopes[f]![c]! * slopes[g]![c]!
    matrix[f * count + f]! += 0.5
  }
  return solveInPlace(matrix, right, count) ? right : undefined
}
