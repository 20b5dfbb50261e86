import { ballastForNeutral, checkFloat, DENSITIES, filmPart, type FloatCheck, type LurePart, partByMass, partByVolume } from '#shared/blank/float'
import type { Lip } from '#shared/blank/blank-shape'
import { seaWaterDensity_EOS80, waterDensity_Tanaka2001 } from '#shared/blank/water-density'

/** Woods the check knows a usual density of. */
export const WOODS = ['balsa', 'basswood', 'cedar', 'alder', 'pine', 'maple'] as const
export const BALLASTS = ['tungsten', 'brass', 'steel', 'lead'] as const
export type Ballast = typeof BALLASTS[number]

/** What one says about a lure before it meets the water. */
export interface FloatWish {
  /** Wood, g/cm³. */
  wood: number
  ballast: Ballast
  /** g. */
  ballastMass: number
  /** The ballast lies in a hole in the wood, rather than outside. */
  isLetIn: boolean
  /** Hooks, rings and wire, g, of steel. */
  hardware: number
  /** Paint and clear over the body, mm. */
  film: number
  /** Water, °C, 0 to 40. */
  celsius: number
  /** Practical salinity, 0 (fresh) to 42. */
  salinity: number
}

/** Salted or not, a lure as most are. Common practice. */
export const USUAL_WISH: FloatWish = {
  wood: DENSITIES.basswood, ballast: 'tungsten', ballastMass: 3, isLetIn: true, hardware: 5, film: 0.3, celsius: 15, salinity: 0,
}

/** Density of paint and clear when cured, g/cm³. Planning value (common practice: 1.10 to 1.18). */
export const FILM_DENSITY = 1.15

/** One part of the sum, and how it came about. */
export interface FloatRow extends LurePart { what: string, how: string }

/** The check with all it was made from. */
export interface FloatSum extends FloatCheck {
  /** Density of the water, g/cm³. */
  water: number
  rows: FloatRow[]
  /** Ballast that would make it hang, g; negative when it sinks without any. */
  neutralBallast: number
}

const figure = (value: number, places = 2) => String(Number(value.toFixed(places)))

/** Density of water, g/cm³. Fresh: Tanaka 2001; with salt: EOS-80. */
export function densityOfWater(celsius: number, salinity: number): number {
  return (salinity > 0 ? seaWaterDensity_EOS80(salinity, celsius) : waterDensity_Tanaka2001(celsius)) / 1000
}

/**
 * Adds up a lure part by part and says whether it floats.
 *
 * @param body area in mm² and volume in mm³ of the bare body; fins are light and left out
 * @throws {RangeError} when a figure is out of range, or the ballast is larger than the body
 */
export function floatSum(wish: FloatWish, body: { areaMm2: number, volumeMm3: number }, lip?: Lip): FloatSum {
  const water = densityOfWater(wish.celsius, wish.salinity)
  const ballastDensity = DENSITIES[wish.ballast]
  const ballast = partByMass(wish.ballastMass, ballastDensity)
  const whole = body.volumeMm3 / 1000
  const woodVolume = wish.isLetIn ? whole - ballast.volume : whole
  if (woodVolume <= 0) throw new RangeError('So much ballast is larger than the body it is let into.')
  const around = [
    row('hooks, rings, wire', partByMass(wish.hardware, DENSITIES.steel), `steel, ${figure(DENSITIES.steel)} g/cm³`),
    row('paint and clear', filmPart(body.areaMm2, wish.film, FILM_DENSITY), `${figure(body.areaMm2 / 100, 1)} cm² × ${figure(wish.film)} mm × ${figure(FILM_DENSITY)} g/cm³`),
    ...lip ? [row('lip', partByVolume(lip.length * lip.width * lip.thickness / 1000, DENSITIES.polycarbonate), `${figure(lip.length, 1)} × ${figure(lip.width, 1)} × ${figure(lip.thickness, 1)} mm, polycarbonate`)] : [],
  ]
  const rows = [
    row('wood', partByVolume(woodVolume, wish.wood), wish.isLetIn ? `${figure(whole)} cm³ less the ballast’s ${figure(ballast.volume)}, × ${figure(wish.wood)} g/cm³` : `${figure(whole)} cm³ × ${figure(wish.wood)} g/cm³`),
    row('ballast', ballast, `${wish.ballast}, ${figure(ballastDensity)} g/cm³`),
    ...around,
  ].filter(part => part.mass > 0)
  const without = [partByVolume(whole, wish.wood), ...around]
  return {
    ...checkFloat(rows, water), water, rows,
    neutralBallast: ballastForNeutral(without, water, ballastDensity, wish.isLetIn ? wish.wood : undefined),
  }
}

function row(what: string, part: LurePart, how: string): FloatRow {
  return { what, how, ...part }
}

/** What the check says, in a sentence. */
export function floatWords({ outcome, netLift }: FloatCheck): string {
  const grams = `${figure(Math.abs(netLift))} g`
  switch (outcome) {
    case 'floats': return `It floats: ${grams} would still hang from it.`
    case 'hangs': return 'It hangs where it is put.'
    case 'sinks': return `It sinks: it pulls with ${grams}.`
  }
}
