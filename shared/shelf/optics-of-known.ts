import type { Lab, PaintKnown } from './paint'
import { paintOpticsFrom, type PaintOptics } from '#shared/optics/paint-optics'

/**
 * The engine's optical data for one pass of a paint as usually sprayed, from what is known of its colour.
 *
 * @throws {RangeError} in words, when the colours contradict themselves or lie out of range
 */
export function opticsOfKnown(known: PaintKnown): PaintOptics {
  switch (known.how) {
    case 'two-swatches':
    case 'masstone-hide':
    case 'clear':
      return paintOpticsFrom(known)
    case 'dye-over-white':
      return paintOpticsFrom(known)
    case 'fluorescent': {
      const { emissionPeak: peak, emissionWidth: width, quantumYield, overWhite, passes, haze } = known
      return paintOpticsFrom({ how: 'dye-over-white', overWhite, passes, haze, fluorescent: { peak, width, quantumYield } })
    }
    case 'flake':
      return flakeOptics(known)
  }
}

function flakeOptics({ oxide, thickness, wanted, flakesPerPass, sigma, edge, tint }: Extract<PaintKnown, { how: 'flake' }>): PaintOptics {
  const bare = oxide === 'aluminium'
    ? paintOpticsFrom({ how: 'metallic', flakesPerPass, sigma, edge })
    : paintOpticsFrom({ how: 'interference', oxide, ...toldBy(thickness, wanted), flakesPerPass, sigma, edge })
  if (!tint) return bare
  const dye = paintOpticsFrom({ how: 'dye-over-white', overWhite: tint.overWhite, passes: tint.passes })
  return { ...bare, K: dye.K, S: dye.S, clipped: dye.clipped }
}

function toldBy(thickness: number | undefined, wanted: Lab | undefined): { thickness: number } | { wanted: Lab } {
  if (thickness !== undefined) return { thickness }
  if (wanted !== undefined) return { wanted }
  throw new RangeError('A pearl needs the colour its face should have, or the thickness of its oxide layer in nm.')
}
