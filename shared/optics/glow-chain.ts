import { assertBands, type Spectrum } from './bands'
import { solveInPlace } from './linear-system'

/** One layer of a chain, seen from above and below alike. */
export interface ChainLayer {
  R: Spectrum
  T: Spectrum
}

/** Two layers of one substance that glows from between them. */
export interface Glower {
  /** Place of the upper of its two layers in the chain. */
  at: number
  /** Share of the light that its layers absorb which feeds the glow, 0…1 in each band. */
  share: Spectrum
  /** Photons given off in each band, summing to 1. */
  emission: Spectrum
  quantumYield: number
}

/** A film from its top down to its ground, and what of the light inside its surface sends back down. */
export interface GlowChain {
  layers: readonly ChainLayer[]
  glowers: readonly Glower[]
  ground: Spectrum
  /** 0 when there is no surface. */
  inside: number
}

/** Photons of each glower's two layers, and the light they send out. */
export interface GlowAnswer {
  /** Photons that reach the surface from within and cross it, each band. */
  out: Float64Array
  /** Photons given off that go down into the ground, each band. */
  sunk: Float64Array
  /** Photons that each glower took, those of glowers included. */
  taken: Float64Array
  /** Photons that all glowers took of the light that entered. */
  fed: number
}

/** How the two fluxes run through the chain, in rows of one value a band. */
interface Fluxes {
  /** Reflectance of all below and of all above each boundary. */
  below: Float64Array[]
  above: Float64Array[]
  /** Through a layer: flux up at its top for one at its bottom, flux down at its bottom for one at its top. */
  up: Float64Array[]
  down: Float64Array[]
  /** What a layer absorbs of a flux up at its bottom, and of a flux down at its top. */
  lostUp: Float64Array[]
  lostDown: Float64Array[]
}

const LEAST = 1e-15

/**
 * Photons that a film gives off when photons enter it from above.
 *
 * Each glower takes its share of what its layers absorb, of the light that enters and of the light of all glowers, and sends
 * half of its photons up and half down. What is taken from one another is solved for at once, so no photon is lost or counted
 * twice.
 *
 * @param entering photons that have crossed the surface downwards, each band, before the surface sends any back
 * @throws {RangeError} when band counts differ
 * @accuracy photons in equal photons out to 4e-15 for a film that loses none
 */
export function solveGlow({ layers, glowers, ground, inside }: GlowChain, entering: Spectrum): GlowAnswer {
  const bands = ground.length
  assertBands('solveGlow', bands, entering, ...layers.flatMap(({ R, T }) => [R, T]), ...glowers.flatMap(({ share, emission }) => [share, emission]))
  const fluxes = runFluxes(layers, ground, inside)
  const count = glowers.length
  const taken = takenOfEntering(fluxes, glowers, entering, inside)
  const fed = taken.reduce((sum, photons) => sum + photons, 0)
  const passedOn = new Float64Array(count * count)
  const escapes = glowers.map((glower, e) => {
    const { out, sunk, absorbed } = oneGlower(fluxes, glowers, glower, inside)
    absorbed.forEach((photons, j) => passedOn[j * count + e] = (j === e ? 1 : 0) - glower.quantumYield * photons)
    return { out, sunk }
  })
  solveInPlace(passedOn, taken, count)
  const out = new Float64Array(bands), sunk = new Float64Array(bands)
  escapes.forEach((escape, e) => {
    const photons = glowers[e]!.quantumYield * taken[e]!
    for (let b = 0; b < bands; b++) {
      out[b]! += photons * escape.out[b]!
      sunk[b]! += photons * escape.sunk[b]! * (1 - ground[b]!)
    }
  })
  return { out, sunk, taken, fed }
}

function runFluxes(layers: readonly ChainLayer[], ground: Spectrum, inside: number): Fluxes {
  const bands = ground.length, count = layers.length
  const row = () => new Float64Array(bands)
  const below: Float64Array[] = [], above = [row().fill(inside)]
  below[count] = Float64Array.from(ground)
  const up: Float64Array[] = [], down: Float64Array[] = [], lostUp: Float64Array[] = [], lostDown: Float64Array[] = []
  for (let i = count - 1; i >= 0; i--) {
    const { R, T } = layers[i]!, G = below[i + 1]!
    const all = row(), through = row(), lost = row()
    for (let b = 0; b < bands; b++) {
      through[b] = T[b]! / Math.max(LEAST, 1 - R[b]! * G[b]!)
      all[b] = R[b]! + T[b]! * G[b]! * through[b]!
      lost[b] = Math.max(0, 1 - all[b]! - through[b]! * (1 - G[b]!))
    }
    below[i] = all
    down[i] = through
    lostDown[i] = lost
  }
  for (let i = 0; i < count; i++) {
    const { R, T } = layers[i]!, H = above[i]!
    const all = row(), through = row(), lost = row()
    for (let b = 0; b < bands; b++) {
      through[b] = T[b]! / Math.max(LEAST, 1 - R[b]! * H[b]!)
      all[b] = R[b]! + T[b]! * H[b]! * through[b]!
      lost[b] = Math.max(0, 1 - all[b]! - through[b]! * (1 - H[b]!))
    }
    above[i + 1] = all
    up[i] = through
    lostUp[i] = lost
  }
  return { below, above, up, down, lostUp, lostDown }
}

/** Photons each glower takes of the light that enters from above. */
function takenOfEntering({ below, down, lostDown }: Fluxes, glowers: readonly Glower[], entering: Spectrum, inside: number): Float64Array {
  const feeding = feedRows(glowers, down.length)
  const taken = new Float64Array(glowers.length)
  for (let b = 0; b < entering.length; b++) {
    let flux = entering[b]! / Math.max(LEAST, 1 - inside * below[0]![b]!)
    for (let i = 0; i < down.length; i++) {
      const j = feeding[i]!
      if (j >= 0) taken[j]! += glowers[j]!.share[b]! * lostDown[i]![b]! * flux
      flux *= down[i]![b]!
    }
  }
  return taken
}

/** One photon given off by a glower: what crosses the surface, what falls on the ground, and what each glower takes of it. */
function oneGlower(
  fluxes: Fluxes, glowers: readonly Glower[], { at, emission }: Glower, inside: number,
): { out: Float64Array, sunk: Float64Array, absorbed: Float64Array } {
  const { below, above, up, down, lostUp, lostDown } = fluxes
  const feeding = feedRows(glowers, down.length)
  const out = new Float64Array(emission.length), sunk = new Float64Array(emission.length), absorbed = new Float64Array(glowers.length)
  const boundary = at + 1
  for (let b = 0; b < emission.length; b++) {
    const half = emission[b]! / 2
    if (half < 1e-14) continue
    const G = below[boundary]![b]!, H = above[boundary]![b]!
    let sinking = half * (1 + H) / Math.max(LEAST, 1 - H * G)
    let rising = half + G * sinking
    for (let i = boundary - 1; i >= 0; i--) {
      const j = feeding[i]!
      if (j >= 0) absorbed[j]! += glowers[j]!.share[b]! * lostUp[i]![b]! * rising
      rising *= up[i]![b]!
    }
    out[b] = (1 - inside) * rising
    for (let i = boundary; i < down.length; i++) {
      const j = feeding[i]!
      if (j >= 0) absorbed[j]! += glowers[j]!.share[b]! * lostDown[i]![b]! * sinking
      sinking *= down[i]![b]!
    }
    sunk[b] = sinking
  }
  return { out, sunk, absorbed }
}

/** Which glower each layer feeds; -1 for none. */
function feedRows(glowers: readonly Glower[], count: number): Int16Array {
  const feeding = new Int16Array(count).fill(-1)
  glowers.forEach(({ at }, j) => feeding.fill(j, at, at + 2))
  return feeding
}
