import type { Spectrum } from './bands'
import { type CoatLayer, filmInto } from './film'
import type { SingleFlake } from './flake'

/** Flakes over a point past which a coat is as good as endless. */
const FLAKES_MOST = 200

/**
 * A coat in which flakes lie over one another by chance.
 *
 * The number of flakes over a point is Poisson; over a point with m of them light meets m + 1 slabs of binder with a flake
 * between each two. The coat is the mean over points.
 *
 * @param flake         R and T of one flake, n bands
 * @param flakesPerPass mean number of flakes over a point after one pass, ≥ 0
 * @param K, S          of the binder per pass, n bands
 * @param passes        ≥ 0
 */
export function flakeCoat(flake: SingleFlake, flakesPerPass: number, K: Spectrum, S: Spectrum, passes: number): CoatLayer {
  const shares = poissonShares(Math.min(FLAKES_MOST, flakesPerPass * passes))
  const R = new Float64Array(K.length), T = new Float64Array(K.length)
  const column = new Float64Array(2)
  for (let b = 0; b < K.length; b++) {
    const bare = K[b] === 0 && S[b] === 0
    column[0] = 0
    column[1] = 1
    for (let m = 0; m < shares.length; m++) {
      if (!bare) columnInto(flake.R[b]!, flake.T[b]!, m, K[b]!, S[b]!, passes, column)
      else if (m > 0) addAlike(flake.R[b]!, flake.T[b]!, column)
      R[b]! += shares[m]! * column[0]
      T[b]! += shares[m]! * column[1]
    }
  }
  return { R, T }
}

/** Chances of 0, 1, 2 … flakes, cut where what is left is below 1e-12; they sum to 1. */
export function poissonShares(mean: number): number[] {
  const shares = [Math.exp(-mean)]
  let left = 1 - shares[0]!
  for (let m = 1; left > 1e-12 && m < mean + 12 * Math.sqrt(mean) + 20; m++) {
    shares.push(shares[m - 1]! * mean / m)
    left -= shares[m]!
  }
  const whole = shares.reduce((sum, share) => sum + share, 0)
  return shares.map(share => share / whole)
}

/** A column of m flakes and m + 1 slabs of binder; the same seen from above and below. */
function columnInto(r: number, t: number, m: number, K: number, S: number, passes: number, column: Float64Array): void {
  const slab = new Float64Array(2)
  filmInto(K, S, passes / (m + 1), slab)
  let above = slab[0]!, below = slab[0]!, through = slab[1]!
  for (let i = 0; i < m; i++) {
    // a flake under the column so far, then a slab under that
    for (const [R, T] of [[r, t], [slab[0]!, slab[1]!]] as const) {
      const bounce = Math.max(1e-15, 1 - below * R)
      above += through * through * R / bounce
      below = R + T * T * below / bounce
      through *= T / bounce
    }
  }
  column[0] = above
  column[1] = through
}

/** Adds one more flake to a column of flakes alone. */
function addAlike(r: number, t: number, column: Float64Array): void {
  const bounce = Math.max(1e-15, 1 - r * column[0]!)
  column[0] = r + t * t * column[0]! / bounce
  column[1] = t * column[1]! / bounce
}
