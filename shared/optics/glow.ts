import { assertBands, type Bands, type Spectrum } from './bands'
import { coefficientsIn } from './coat-layer'
import { type CoatLayer, filmLayer, layOver } from './film'
import { flakeCoat } from './flake-coat'
import { emissionPhotons, type Glow, glowOf } from './fluorescence'
import { type ChainLayer, type Glower, solveGlow } from './glow-chain'
import { meanFlakeInDiffuse } from './mean-flake'
import type { PaintOptics } from './paint-optics'
import { AIR_SURFACE, type SurfaceLoss } from './surface'
import { toPictureBands } from './to-picture-bands'

/** A coat that glows is cut into this many sublayers, thin at the top where most light is taken. */
export const SUBLAYERS = 8

/** Layers of a coat that glows, from its top down, and the glowers between them. */
export interface GlowingCoat { layers: ChainLayer[], glowers: Glower[] }

/** Cuts a coat that glows into sublayers with edges passes·(j/8)³, each split in two halves with its glow between them. */
export function glowingCoat(paint: PaintOptics, glow: Glow, passes: number, bands: Bands = 'exact36', sublayers: number = SUBLAYERS): GlowingCoat {
  const emission = inBands(emissionPhotons(glow), bands)
  const share = glowShare(paint, glow, bands)
  const layers: ChainLayer[] = [], glowers: Glower[] = []
  for (let j = 0; j < sublayers; j++) {
    const thick = passes * (((j + 1) / sublayers) ** 3 - (j / sublayers) ** 3)
    const half = sliceOf(paint, thick / 2, bands)
    glowers.push({ at: layers.length, share, emission, quantumYield: glow.quantumYield })
    layers.push(half, half)
  }
  return { layers, glowers }
}

function sliceOf(paint: PaintOptics, passes: number, bands: Bands): CoatLayer {
  const { K, S } = coefficientsIn(paint, bands)
  if (!paint.flake) return filmLayer(K, S, passes)
  return flakeCoat(meanFlakeInDiffuse(paint.flake, bands), paint.flake.flakesPerPass, K, S, passes)
}

/** Share of what a coat absorbs that feeds its glow: the rest goes to its other dyes and to flakes that absorb. */
export function glowShare(paint: PaintOptics, glow: Glow, bands: Bands): Float64Array {
  const { K } = coefficientsIn(paint, bands)
  const one = paint.flake && meanFlakeInDiffuse(paint.flake, bands)
  return inBands(Float64Array.from(glow.Kf), bands).map((Kf, b) => {
    const flakes = one ? paint.flake!.flakesPerPass * Math.max(0, 1 - one.R[b]! - one.T[b]!) : 0
    const whole = K[b]! + flakes
    return whole > 0 ? Math.min(1, Kf / whole) : 0
  })
}

function inBands(spectrum: Float64Array, bands: Bands): Float64Array {
  return bands === 'exact36' ? spectrum : toPictureBands(spectrum)
}

/** A coat as glow sees it: its paint, its passes and its layer in diffuse light. */
export interface CoatForGlow { optics: PaintOptics, passes: number, layer: CoatLayer }

/** True when some coat glows. */
export function hasGlow(coats: readonly { optics: PaintOptics }[]): boolean {
  return coats.some(({ optics }) => glowOf(optics) !== undefined)
}

/**
 * Photons that a stack gives off, 36 bands, in the units of those that fall on it; the same to all sides.
 *
 * Light below 380 nm is left out: it feeds a glow too, a little more in the sun than this says.
 *
 * @param coats     the first sprayed first
 * @param ground    reflectance inside the ground, 36 bands
 * @param falling   photons that fall on the stack, 36 bands (`fallingLight`)
 * @param surface   against what the film ends
 * @param sublayers into how many a coat that glows is cut
 */
export function glowPhotons(
  coats: readonly CoatForGlow[], ground: Spectrum, falling: Spectrum, { outside, inside }: Pick<SurfaceLoss, 'outside' | 'inside'> = AIR_SURFACE, sublayers: number = SUBLAYERS,
): Float64Array {
  const lowest = coats.findIndex(({ optics, passes }) => passes > 0 && glowOf(optics) !== undefined)
  if (lowest < 0) return new Float64Array(36)
  assertBands('glowPhotons', 36, falling)
  // What lies under the lowest glow is one ground to it.
  const under = Float64Array.from(ground)
  for (const { layer } of coats.slice(0, lowest)) layOver(layer, under, under)
  const layers: ChainLayer[] = [], glowers: Glower[] = []
  for (const { optics, passes, layer } of coats.slice(lowest).reverse()) {
    const glow = glowOf(optics)
    if (!glow || passes === 0) {
      layers.push(layer)
      continue
    }
    const cut = glowingCoat(optics, glow, passes, 'exact36', sublayers)
    for (const glower of cut.glowers) glowers.push({ ...glower, at: glower.at + layers.length })
    layers.push(...cut.layers)
  }
  const entering = Float64Array.from(falling, photons => (1 - outside) * photons)
  return solveGlow({ layers, glowers, ground: under, inside }, entering).out
}
