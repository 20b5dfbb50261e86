import { coatLayer, flakeCoatAt } from './coat-layer'
import type { Lab } from './colorimetry'
import type { CoatLayer } from './film'
import { type Aspecular, flakeGeometry } from './flake-angles'
import { glowOf } from './fluorescence'
import { glowPhotons } from './glow'
import { weigh } from './light-power'
import type { ExactSeen } from './seen-exact'
import type { Coat, Stack } from './stack'
import { VEIL } from './surface'

/** A coat worked out for looking at many stacks that differ from one another in one coat; 36 bands each. */
export interface QuickCoat {
  coat: Coat
  layer: CoatLayer
  glows: boolean
  /** What a ray keeps that goes down and up again through the coat. */
  through: Float64Array
  /** Only with flakes: what they mirror to the eye at an angle, less what the same flakes sent to all sides. */
  mirrored?: Readonly<Partial<Record<Aspecular, Float64Array>>>
}

/** A glow is cut this coarsely: only differences between stacks cut alike are looked at. */
const SUBLAYERS = 2
const BANDS = 36

const AT_45: readonly Aspecular[] = [45]

/** Works one coat out, for the angles it will be looked at from. */
export function quickCoat(coat: Coat, { surface }: ExactSeen, angles: readonly Aspecular[] = AT_45): QuickCoat {
  const { optics, passes } = coat
  const layer = coatLayer(optics, passes), glows = glowOf(optics) !== undefined
  if (!optics.flake) return { coat, layer, glows, through: layer.T.map((_, b) => Math.exp(-2 * (optics.K[b]! + optics.S[b]!) * passes)) }
  const geometry = angles.map(angle => flakeGeometry(angle, optics.flake!.sigma, surface.index))
  const lit = flakeCoatAt(optics, passes, geometry.map(({ cosine }) => cosine))
  const evenly = (1 - surface.outside) * (1 - surface.inside), share = 1 - optics.flake.edge
  const mirrored = Object.fromEntries(angles.map((angle, a) => [angle, lit[a]!.R.map((R, b) => share * (geometry[a]!.gain * R - evenly * layer.R[b]!))]))
  return { coat, layer, glows, through: layer.T.map(T => T * T), mirrored }
}

/**
 * L*, a*, b* of a stack lit from 45° and seen straight on: as `promise` has it, but for a coarser glow. Cheap when most coats are
 * worked out already.
 */
export function quickLab({ ground, finish }: Pick<Stack, 'ground' | 'finish'>, coats: readonly QuickCoat[], seen: ExactSeen): Lab {
  const { surface: { outside, inside, veil }, weights, photons, given, surface } = seen
  const light = Float64Array.from(ground)
  for (const { layer: { R, T } } of coats) {
    for (let b = 0; b < BANDS; b++) light[b] = R[b]! + T[b]! * T[b]! * light[b]! / Math.max(1e-15, 1 - R[b]! * light[b]!)
  }
  const shown = veil * VEIL[finish], crossing = (1 - outside) * (1 - inside)
  for (let b = 0; b < BANDS; b++) light[b] = shown + crossing * light[b]! / (1 - inside * light[b]!)
  addMirrored(coats, light)
  const xyz = weigh(weights, light)
  if (!coats.some(({ glows }) => glows)) return seen.lab(xyz)
  const glow = weigh(given, glowPhotons(coats.map(({ coat: { optics, passes }, layer }) => ({ optics, passes, layer })), ground, photons, surface, SUBLAYERS))
  return seen.lab([xyz[0] + glow[0], xyz[1] + glow[1], xyz[2] + glow[2]])
}

function addMirrored(coats: readonly QuickCoat[], light: Float64Array): void {
  const lowest = coats.findIndex(({ mirrored }) => mirrored)
  if (lowest < 0) return
  const reaching = new Float64Array(BANDS).fill(1)
  for (let i = coats.length - 1; i >= lowest; i--) {
    const { through } = coats[i]!, mirrored = coats[i]!.mirrored?.[45]
    for (let b = 0; b < BANDS; b++) {
      if (mirrored) light[b]! += reaching[b]! * mirrored[b]!
      reaching[b]! *= through[b]!
    }
  }
  for (let b = 0; b < BANDS; b++) light[b] = Math.max(0, light[b]!)
}
