/** Index of paint binder and epoxy. */
export const FILM_INDEX = 1.5
/** Roughness of a matt film's surface, as the slope spread of its facets. Chosen by eye. */
const MATT_SLOPE = Math.SQRT2 * Math.tan(22 * Math.PI / 180)

/** Squared slope, in units of the spread, past which flakes are as good as none: e to the minus this. */
const STEEPEST = 14

/** Share of unpolarised light a smooth surface mirrors; `cosine` of the angle outside it, 0-1. @source Fresnel's equations */
export function fresnel(cosine: number, index: number = FILM_INDEX): number {
  const inside = Math.sqrt(1 - (1 - cosine * cosine) / (index * index))
  const s = (cosine - index * inside) / (cosine + index * inside)
  const p = (index * cosine - inside) / (index * cosine + inside)
  return (s * s + p * p) / 2
}

/** Slope spread of flakes whose tilts spread by `sigma` degrees. */
export function flakeSlope(sigma: number): number {
  return Math.SQRT2 * Math.tan(sigma * Math.PI / 180)
}

/** Beckmann's distribution of facets for the cosine of their tilt. */
export function facetShare(cosine: number, slope: number): number {
  const c2 = cosine * cosine
  return Math.exp(-(1 - c2) / (c2 * slope * slope)) / (Math.PI * slope * slope * c2 * c2)
}

/** What a lamp in one direction gives a surface point seen from another. */
export interface LobeReading {
  /** How much brighter than a white diffuser flakes that mirror everything would look: E1·G. */
  flake: number
  /** Cosine of the angle at which light meets those flakes, inside the film. */
  local: number
}

/**
 * Flake lobe for unit directions given by cosines: lamp to normal, eye to normal, lamp to eye.
 *
 * Both directions are refracted into the film, the flake lies on their true half vector.
 * @param slope `flakeSlope` of the paint
 * @param index refractive index of the film against what lies outside
 * @source geometry of ASTM E2539 readings; Beckmann distribution; Fresnel transmission at the film's surface
 */
export function flakeLobe(cosLamp: number, cosEye: number, cosBetween: number, slope: number, out: LobeReading, index: number = FILM_INDEX): LobeReading {
  const n2 = index * index
  const inLamp = Math.sqrt(1 - (1 - cosLamp * cosLamp) / n2)
  const inEye = Math.sqrt(1 - (1 - cosEye * cosEye) / n2)
  // Tangential parts shrink by the index; what is left of the angle between them follows.
  const between = (cosBetween - cosLamp * cosEye) / n2 + inLamp * inEye
  const local = Math.sqrt(Math.max(0, (1 + between) / 2))
  const tilt = Math.min(1, (inLamp + inEye) / (2 * Math.max(local, 1e-6)))
  out.local = local
  // Hardly a flake lies that steeply.
  if ((1 - tilt * tilt) > STEEPEST * slope * slope * tilt * tilt) {
    out.flake = 0
    return out
  }
  const through = (1 - fresnel(cosLamp, index)) * (1 - fresnel(cosEye, index)) / n2
  out.flake = through * Math.PI * facetShare(tilt, slope) / (4 * inLamp * inEye)
  return out
}

/** Light a matt surface mirrors toward the eye from one lamp, against a white diffuser. */
export function mattLobe(cosLamp: number, cosEye: number, cosBetween: number): number {
  const half = Math.sqrt(Math.max(1e-9, (1 + cosBetween) / 2))
  const tilt = Math.min(1, (cosLamp + cosEye) / (2 * half))
  // Eyes and lamps that graze the film are shadowed by its own facets.
  const grazing = Math.max(0.12, cosLamp * cosEye)
  return Math.PI * facetShare(tilt, MATT_SLOPE) * fresnel(half) / (4 * grazing)
}
