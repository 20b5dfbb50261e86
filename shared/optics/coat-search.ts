import { type Lab, labFromXyz, type Light, type Xyz } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { filmInto, overGround } from './film'
import type { Spectrum } from './bands'
import { weightsFor } from './lights'
import { type Finish, measuredFromInternal } from './surface'

/** Passes at which a search begins, as shares of the most that may be sprayed. */
const SEEDS = [0.02, 0.04, 0.08, 0.15, 0.27, 0.5, 1]
/** Golden section stops when passes are known to this share. */
const NEAR = 0.004
const GOLDEN = (Math.sqrt(5) - 1) / 2

/** What one amount of paint comes to. */
export interface Reached { passes: number, deltaE: number }

/** Colour of a film of K and S per pass, 36 bands, after some passes. */
export type FilmColour = (K: Spectrum, S: Spectrum, passes: number) => Lab

/** Sets up the colours of films over one ground, seen under one light. Allocates nothing per colour but the answer. */
export function filmColours(ground: Spectrum, finish: Finish, light: Light): FilmColour {
  const { x, y, z } = weightsFor(light)
  const pair = new Float64Array(2)
  return (K, S, passes) => {
    const xyz: Xyz = [0, 0, 0]
    for (let i = 0; i < 36; i++) {
      filmInto(K[i]!, S[i]!, passes, pair)
      const seen = measuredFromInternal(overGround(pair[0]!, pair[1]!, ground[i]!), finish)
      xyz[0] += x[i]! * seen
      xyz[1] += y[i]! * seen
      xyz[2] += z[i]! * seen
    }
    return labFromXyz(xyz, light)
  }
}

/**
 * Passes that bring a coat nearest to a colour: seeds first, then golden section round the best of them.
 *
 * @param colourAt   colour after some passes
 * @param passesMost the most that may be sprayed, > 0
 * @param enough     CIEDE2000: when no seed comes this near, the search is not gone on with
 */
export function bestPasses(colourAt: (passes: number) => Lab, target: Lab, passesMost: number, enough = Infinity): Reached {
  const distance = (passes: number) => deltaE2000(colourAt(passes), target)
  const seeds = SEEDS.map(share => ({ passes: share * passesMost, deltaE: distance(share * passesMost) }))
  let best = 0
  seeds.forEach((seed, i) => {
    if (seed.deltaE < seeds[best]!.deltaE) best = i
  })
  if (seeds[best]!.deltaE > enough) return seeds[best]!
  const low = seeds[best - 1]?.passes ?? 0
  const high = seeds[best + 1]?.passes ?? passesMost
  const found = golden(distance, low, high)
  return found.deltaE < seeds[best]!.deltaE ? found : seeds[best]!
}

/** How far round passes that are nearly the nearest the nearest may lie, as a share. */
const AROUND = 0.15

/** The nearest close to passes that come near already. */
export function nearestAround(colourAt: (passes: number) => Lab, target: Lab, near: Reached, passesMost: number): Reached {
  const distance = (passes: number) => deltaE2000(colourAt(passes), target)
  const found = golden(distance, near.passes * (1 - AROUND), Math.min(passesMost, near.passes * (1 + AROUND)))
  return found.deltaE < near.deltaE ? found : near
}

function golden(distance: (passes: number) => number, from: number, to: number): Reached {
  let low = from, high = to
  let left = high - GOLDEN * (high - low), right = low + GOLDEN * (high - low)
  let atLeft = distance(left), atRight = distance(right)
  while (high - low > NEAR * high) {
    if (atLeft <= atRight) {
      high = right
      right = left
      atRight = atLeft
      left = high - GOLDEN * (high - low)
      atLeft = distance(left)
    }
    else {
      low = left
      left = right
      atLeft = atRight
      right = low + GOLDEN * (high - low)
      atRight = distance(right)
    }
  }
  return atLeft <= atRight ? { passes: left, deltaE: atLeft } : { passes: right, deltaE: atRight }
}
