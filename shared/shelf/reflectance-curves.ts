import type { Card } from './drawdown'
import { BANDS_36 } from '#shared/optics/bands'
import { groundFromLab } from '#shared/optics/known-film'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { stackReflectance } from '#shared/optics/stack'

/** One curve: share of the light sent back at each of 36 wavelengths, 0 to 1 and a little over for a strong flake. */
export interface ReflectanceCurve {
  key: 'masstone' | 'over black' | 'over white'
  words: string
  values: number[]
}

/** Wavelengths of a curve's values, nm. */
export const CURVE_WAVELENGTHS: readonly number[] = BANDS_36

/** So many passes hide any ground that the paint can hide. */
const THICK = 40

/**
 * Reflectance of a paint through its surface, under gloss: thick where it can hide, and at a number of passes over both halves
 * of a card. Of a flake this is the light it scatters, not its flash.
 */
export function reflectanceCurves(optics: PaintOptics, card: Card, passes: number): ReflectanceCurve[] {
  const over = (ground: Card['black'], count: number) =>
    Array.from(stackReflectance({ ground: groundFromLab(ground), coats: [{ optics, passes: count }], finish: 'gloss' }).measured)
  const thin: ReflectanceCurve[] = [
    { key: 'over white', words: 'over white', values: over(card.white, passes) },
    { key: 'over black', words: 'over black', values: over(card.black, passes) },
  ]
  return hasMasstone(optics) ? [{ key: 'masstone', words: 'own colour, thick', values: over(card.black, THICK) }, ...thin] : thin
}

/** Whether thick paint has a colour of its own: what only absorbs turns black, and what does neither stays as it was. */
export function hasMasstone(optics: PaintOptics): boolean {
  return optics.kind === 'film' && Math.max(...optics.S) > SCATTERS
}

const SCATTERS = 0.05
