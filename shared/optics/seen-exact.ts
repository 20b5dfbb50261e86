import type { Spectrum } from './bands'
import { type Lab, labAgainst, labFromXyz, type Xyz } from './colorimetry'
import { kelvinLight } from './kelvin-light'
import { type BandRows, type Lamp, lampNamed, lampOf, weigh } from './light-power'
import { isLight, type Light } from './lights'
import { adaptWithin } from './screen-colour'
import { seenKey } from './seen-key'
import type { SeenLamp, SeenWish } from './seen-wish'
import { AIR_SURFACE, type SurfaceLoss, WATER_SURFACE } from './surface'
import { ADAPTATION_MOST, PATH_FACTOR, waterShares } from './water-light'

/** What a piece is seen by, in the 36 exact bands: the light that falls on it and how an eye weighs what comes from it. */
export interface ExactSeen {
  key: string
  /** X, Y and Z of a radiance factor in each band; a perfect white in the light above any water has Y = 1. */
  weights: BandRows
  /** Photons that fall on the piece, in the light's own units. */
  photons: Float64Array
  /** X, Y and Z of one photon that leaves the piece. */
  given: BandRows
  /** X, Y and Z of a perfect white there. */
  white: Xyz
  /** Share of the light of the piece that comes to the eye. */
  path: Float64Array
  /** Against what the piece's film ends: air or water. */
  surface: Readonly<SurfaceLoss>
  /** The colour in daylight that looks as this one does to the eye it is seen by. */
  toDaylight: (xyz: Xyz) => Xyz
  /** L*, a*, b* as that eye sees it: in air against the light's own white; under water of `toDaylight`, since no eye gets wholly used to it. */
  lab: (xyz: Xyz) => Lab
}

/**
 * Works out what something is seen by, for numbers: those of a person's eye, whatever eye is wished (`bass-map.ts` has the other's).
 * Keep it: it is the same for every stack.
 *
 * @throws {RangeError} when the colour temperature, the depth or the distance is out of range
 */
export function exactSeen(wish: SeenWish): ExactSeen {
  const lamp = lampBy(wish.light)
  const lampWhite = weigh(lamp.weights, ONES)
  const inDaylight = wish.light === 'D65' ? (xyz: Xyz) => xyz : (xyz: Xyz) => adaptWithin(xyz, lampWhite, Infinity)
  if (!wish.water) {
    return {
      key: seenKey(wish), weights: lamp.weights, photons: lamp.falling.photons, given: lamp.given, white: lampWhite, path: ONES, surface: AIR_SURFACE,
      toDaylight: inDaylight, lab: xyz => labAgainst(xyz, lampWhite),
    }
  }
  const { type, depth, distance, adapted } = wish.water
  const { down, path } = waterShares({ water: type, depth, distance, pathFactor: PATH_FACTOR })
  const weights = filtered(lamp.weights, down.map((share, i) => share * path[i]!))
  const white = weigh(weights, ONES)
  const localWhite = inDaylight(white)
  const toDaylight = adapted ? (xyz: Xyz) => adaptWithin(inDaylight(xyz), localWhite, ADAPTATION_MOST) : inDaylight
  return {
    key: seenKey(wish), weights, white, path, surface: WATER_SURFACE, toDaylight,
    photons: lamp.falling.photons.map((photons, i) => photons * down[i]!),
    given: filtered(lamp.given, path),
    lab: xyz => labFromXyz(toDaylight(xyz)),
  }
}

/** What a light's name, or a wish worked out before, stands for. */
export function resolveSeen(seen: Light | ExactSeen): ExactSeen {
  return isLight(seen) ? NAMED[seen] : seen
}

/** A light by its name or its colour temperature. */
export function lampBy(light: SeenLamp): Lamp {
  return typeof light === 'string' ? lampNamed(light) : lampOf(kelvinLight(light.kelvin))
}

const ONES = new Float64Array(36).fill(1)

function filtered({ x, y, z }: BandRows, shares: Spectrum): BandRows {
  const by = (weights: Float64Array) => weights.map((weight, i) => weight * shares[i]!)
  return { x: by(x), y: by(y), z: by(z) }
}

const NAMED: Readonly<Record<Light, ExactSeen>> = {
  'D65': exactSeen({ light: 'D65' }),
  'A': exactSeen({ light: 'A' }),
  'F11': exactSeen({ light: 'F11' }),
  'LED-5000': exactSeen({ light: 'LED-5000' }),
  'LED-3000': exactSeen({ light: 'LED-3000' }),
}
