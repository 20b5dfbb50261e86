import { type Cup, densityOf } from './cup'
import { type Figure, FILM_ROOM, given, ML_PER_CM2_UM } from './figure'
import { filmPart } from '#shared/blank/float'
import { waterDensity_Tanaka2001 } from '#shared/blank/water-density'

/** Density of a film that dried, g/cm³; of epoxy and its like when cured (common practice: 1.10 to 1.18). */
export const DRY_FILM_DENSITY = 1.15

/** Solids from which a paint keeps its own density, since next to nothing leaves it. */
const NOTHING_LEAVES = 0.95

/** The water a lure is thought into for one number: fresh, °C. The blank's own check asks for the real one. */
export const FLOAT_CELSIUS = 15

/** Density of what a cup leaves on the piece, g/cm³: its own where nothing leaves it, the planning value where something does. */
export function dryDensity({ parts, solids }: Pick<Cup, 'parts' | 'solids'>): number {
  return solids >= NOTHING_LEAVES ? parts.reduce((sum, { paint, share }) => sum + share * densityOf(paint), 0) : DRY_FILM_DENSITY
}

/**
 * What a dry film weighs on one piece, g.
 * @param area cm²
 * @param film dry, µm
 * @param density dry, g/cm³
 */
export function dryWeight(area: number, film: number, density: number): Figure {
  return {
    value: filmPart(area * 100, film / 1000, density).mass, quantity: 'mass', formula: 'A · d · c · ρ',
    inputs: [given('A', 'area of the coat on one piece', area, 'area'), given('d', 'dry film', film, 'film'), FILM_ROOM, given('ρ', 'density when dry', density, 'density')],
  }
}

/** A coat's dry film on one piece. */
export interface DryFilm { area: number, film: number, weight: number }

/** What films weigh together on one piece, g. */
export function weightTogether(films: readonly DryFilm[]): Figure {
  return {
    value: films.reduce((sum, { weight }) => sum + weight, 0), quantity: 'mass', formula: 'sum of its coats',
    inputs: [given('n', 'coats', films.length)],
  }
}

/** What films do to the lift of one piece in fresh water, g: V · w − m. Below zero: it floats less. */
export function liftOf(films: readonly DryFilm[]): Figure {
  const volume = films.reduce((sum, { area, film }) => sum + area * film * ML_PER_CM2_UM, 0)
  const mass = weightTogether(films).value
  const water = waterDensity_Tanaka2001(FLOAT_CELSIUS) / 1000
  return {
    value: volume * water - mass, quantity: 'mass', formula: 'V · w − m',
    inputs: [given('V', 'room the films take', volume, 'volume'), given('w', `density of fresh water at ${FLOAT_CELSIUS} °C`, water, 'density'), given('m', 'weight of the films', mass, 'mass')],
  }
}
