import type { LightRig } from '../light-rig'
import type { LightTables, NormalTable } from '../light-tables'
import { toHalf } from './half-float'
import type { HalfSheet } from './paint-sheet'

/** Values side by side in a texel of a light sheet. */
const CHANNELS = 4

/** A light as the turning view reads it: square tables over the two sideways parts of the normal, -1 to 1, and the tent it mirrors. */
export interface LightSheet {
  side: number
  /** Irradiance, matt reflection; lobe of the first spread of flakes, and cosine at which light meets them. */
  first: HalfSheet
  /** The same two of the second spread of flakes, and two that say nothing. */
  second: HalfSheet
  rig: LightRig
  gain: number
}

/** Lays a light out for flakes of up to two spreads, degrees, under a film of an index against what lies outside. */
export function lightSheet(tables: LightTables, sigmas: readonly number[], index: number): LightSheet {
  const [one, two] = sigmas.map(sigma => tables.flakes(sigma, index))
  return {
    side: Math.sqrt(tables.irradiance.length),
    first: interleaved([tables.irradiance, tables.matt(), one?.strength, one?.local]),
    second: interleaved([two?.strength, two?.local, undefined, undefined]),
    rig: tables.rig, gain: tables.gain,
  }
}

function interleaved(tables: readonly (NormalTable | undefined)[]): HalfSheet {
  const count = Math.max(1, ...tables.map(table => table?.length ?? 0))
  const out = new Uint16Array(CHANNELS * count)
  tables.forEach((table, channel) => table?.forEach((value, i) => {
    out[CHANNELS * i + channel] = toHalf(value)
  }))
  return out
}
