import type { Spectrum } from './bands'

/** How the outermost film ends: its feel is its veil of scattered surface light. */
export type Finish = 'matt' | 'satin' | 'gloss'

/** The finishes, dullest first. */
export const FINISHES = ['matt', 'satin', 'gloss'] as const

/** Light lost at the outside of the surface, and at its inside. @source J. L. Saunderson, J. Opt. Soc. Am. 32 (1942) 727–736 */
export const SURFACE_OUTSIDE = 0.04
/** Share of light inside the film that its surface sends back down. */
export const SURFACE_INSIDE = 0.60

/** Surface light scattered into the eye, as a reflectance. Gloss is read off the highlight. Common practice. */
export const VEIL: Readonly<Record<Finish, number>> = { matt: 0.04, satin: 0.015, gloss: 0 }

/** What a film ends against: light lost at the outside of its surface and at its inside, how much of its veil shows, and how it bends light. */
export interface SurfaceLoss {
  outside: number
  inside: number
  /** Share of `VEIL` that shows. */
  veil: number
  /** Refractive index of the film against what lies outside. */
  index: number
}

/** A film in air. */
export const AIR_SURFACE: Readonly<SurfaceLoss> = { outside: SURFACE_OUTSIDE, inside: SURFACE_INSIDE, veil: 1, index: 1.5 }
/**
 * A film in water, of index 1.333 against the film's 1.5. A matt film's veil falls with what its surface mirrors, to less than a tenth.
 *
 * @source Fresnel's equations, straight on and averaged over diffuse light, as in air
 */
export const WATER_SURFACE: Readonly<SurfaceLoss> = { outside: 0.0035, inside: 0.234, veil: 0.0035 / SURFACE_OUTSIDE, index: 1.5 / 1.333 }

/**
 * What the eye or an instrument sees of a reflectance inside the film.
 *
 * Paint and epoxy bend light alike, so only the top surface counts. The loosely packed, porous top of very matt paint is not
 * modelled: it looks a little paler still.
 */
export function measuredFromInternal(internal: number, finish: Finish, { outside, inside, veil }: SurfaceLoss = AIR_SURFACE): number {
  return veil * VEIL[finish] + (1 - outside) * (1 - inside) * internal / (1 - inside * internal)
}

const THROUGH = (1 - SURFACE_OUTSIDE) * (1 - SURFACE_INSIDE)

/** The reflectance inside the film behind a measured one; undoes `measuredFromInternal`. Below the veil it is negative. */
export function internalFromMeasured(measured: number, finish: Finish): number {
  const withoutVeil = measured - VEIL[finish]
  return withoutVeil / (THROUGH + SURFACE_INSIDE * withoutVeil)
}

/** `measuredFromInternal` for a whole spectrum; `out` may be the input. */
export function measuredSpectrum(internal: Spectrum, finish: Finish, out: Float64Array = new Float64Array(internal.length), surface: SurfaceLoss = AIR_SURFACE): Float64Array {
  for (let i = 0; i < internal.length; i++) out[i] = measuredFromInternal(internal[i]!, finish, surface)
  return out
}

/** `internalFromMeasured` for a whole spectrum, held within 0…1. */
export function internalSpectrum(measured: Spectrum, finish: Finish, out: Float64Array = new Float64Array(measured.length)): Float64Array {
  for (let i = 0; i < measured.length; i++) out[i] = Math.min(1, Math.max(0, internalFromMeasured(measured[i]!, finish)))
  return out
}
