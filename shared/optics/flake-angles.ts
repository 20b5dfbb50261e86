import type { CoatLayer } from './film'
import { flakeCoatAt } from './coat-layer'
import type { Coat } from './stack'
import { AIR_SURFACE, type SurfaceLoss } from './surface'

/** Angles away from the gloss at which flakes are judged, degrees, lit from 45°. @source ASTM E2539; 15, 45, 110 of E2194 */
export const ASPECULAR = [15, 25, 45, 75, 110] as const

/** One of the five angles, degrees. */
export type Aspecular = typeof ASPECULAR[number]

/** How a coat of flakes throws the light of a lamp at 45° to an eye. */
export interface FlakeGeometry {
  /** Cosine of the angle between the light and the flakes that mirror it to the eye, in the binder. */
  cosine: number
  /** Times R of the coat: its radiance factor, before the surface's own share is taken off. */
  gain: number
}

/**
 * Which flakes mirror the lamp to the eye, and how strongly.
 *
 * @param aspecular degrees from the gloss direction towards the lamp, lamp at 45°
 * @param sigma     spread of the flakes' tilt, degrees
 * @param index     refractive index of the film against what lies outside: 1.5 in air
 * @source P. Beckmann, A. Spizzichino, "The Scattering of Electromagnetic Waves from Rough Surfaces" (1963), for the spread;
 *         Fresnel for crossing the surface twice
 */
export function flakeGeometry(aspecular: number, sigma: number, index: number = AIR_SURFACE.index): FlakeGeometry {
  const light = Math.PI / 4
  const eye = (45 - aspecular) * Math.PI / 180
  const lightIn = Math.asin(Math.sin(light) / index)
  const eyeIn = Math.asin(Math.sin(eye) / index)
  const tilt = (eyeIn - lightIn) / 2
  const local = (lightIn + eyeIn) / 2
  const m = Math.SQRT2 * Math.tan(sigma * Math.PI / 180)
  const density = Math.exp(-((Math.tan(tilt) / m) ** 2)) / (Math.PI * m * m * Math.cos(tilt) ** 4)
  const spread = Math.PI * density / (4 * Math.cos(lightIn) * Math.cos(eyeIn))
  const entry = crossing(light, lightIn, index) * crossing(eye, eyeIn, index) / index ** 2
  return { cosine: Math.cos(local), gain: spread * entry }
}

/** Share of unpolarised light that crosses the surface. */
function crossing(outside: number, inside: number, index: number): number {
  if (Math.abs(outside) < 1e-9) return 1 - ((index - 1) / (index + 1)) ** 2
  const s = (Math.sin(outside - inside) / Math.sin(outside + inside)) ** 2
  const p = (Math.tan(outside - inside) / Math.tan(outside + inside)) ** 2
  return 1 - (s + p) / 2
}

/**
 * Radiance factor of a stack with flakes, by angle: what the coats send back to all sides, and what each coat of flakes
 * moves from all sides to where its flakes mirror the lamp.
 *
 * @param layers  the coats in diffuse light, as many as there are coats
 * @param diffuse reflectance of the whole stack as measured, 36 bands
 * @returns 36 values per angle, ≥ 0; above 1 where flakes outshine paper
 */
export function radianceAtAngles<A extends number = Aspecular>(
  coats: readonly Coat[], layers: readonly CoatLayer[], diffuse: Float64Array, angles: readonly A[] = ASPECULAR as readonly number[] as readonly A[],
  surface: SurfaceLoss = AIR_SURFACE,
): Record<A, Float64Array> {
  const answer = Object.fromEntries(angles.map(angle => [angle, Float64Array.from(diffuse)])) as Record<A, Float64Array>
  const reaching = new Float64Array(36).fill(1)
  for (let i = coats.length - 1; i >= 0; i--) {
    const coat = coats[i]!, layer = layers[i]!
    if (coat.optics.flake) moveToMirrors(coat, layer, reaching, angles, surface, answer)
    dim(reaching, coat, layer)
  }
  for (const angle of angles) for (let b = 0; b < 36; b++) answer[angle][b] = Math.max(0, answer[angle][b]!)
  return answer
}

function moveToMirrors<A extends number>(
  coat: Coat, layer: CoatLayer, reaching: Float64Array, angles: readonly A[], { outside, inside, index }: SurfaceLoss, answer: Record<A, Float64Array>,
): void {
  const { sigma, edge } = coat.optics.flake!
  const geometry = angles.map(angle => flakeGeometry(angle, sigma, index))
  const mirrored = flakeCoatAt(coat.optics, coat.passes, geometry.map(g => g.cosine))
  const surface = (1 - outside) * (1 - inside)
  angles.forEach((angle, a) => {
    for (let b = 0; b < 36; b++) {
      answer[angle][b]! += (1 - edge) * reaching[b]! * (geometry[a]!.gain * mirrored[a]!.R[b]! - surface * layer.R[b]!)
    }
  })
}

/** Weakens the light that reaches the coats below, down and up again. */
function dim(reaching: Float64Array, { optics, passes }: Coat, layer: CoatLayer): void {
  for (let b = 0; b < 36; b++) {
    reaching[b]! *= optics.flake ? layer.T[b]! ** 2 : Math.exp(-2 * (optics.K[b]! + optics.S[b]!) * passes)
  }
}
