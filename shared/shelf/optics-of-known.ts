import type { PaintKnown } from './paint'
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
      return { ...paintOpticsFrom({ how: 'dye-over-white', overWhite, passes, haze }), fluorescent: { peak, width, quantumYield } }
    }
    case 'flake':
      return flakeOptics(known)
  }
}

function flakeOptics({ oxide, thickness, flakesPerPass, sigma, edge, tint }: Extract<PaintKnown, { how: 'flake' }>): PaintOptics {
  const bare = oxide === 'aluminium'
    ? paintOpticsFrom({ how: 'metallic', flakesPerPass, sigma, edge })
    : paintOpticsFrom({ how: 'interference', oxide, thickness: thickness ?? required(), flakesPerPass, sigma, edge })
  if (!tint) return bare
  const dye = paintOpticsFrom({ how: 'dye-over-white', overWhite: tint.overWhite, passes: tint.passes })
  return { ...bare, K: dye.K, S: dye.S }
}

function required(): never {
  throw new RangeError('A pearl needs the thickness of its oxide layer, in nm.')
}
