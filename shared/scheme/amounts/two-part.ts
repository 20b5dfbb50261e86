import type { TwoPart } from '#shared/shelf/paint'

/** Hardener to one part of resin, both ways it is measured; null where a density would be needed for it. */
export function hardenerToResin({ by, resin, hardener, resinDensity, hardenerDensity }: TwoPart): { volume: number | null, weight: number | null } {
  const ratio = hardener / resin
  const heavier = resinDensity === undefined || hardenerDensity === undefined ? null : hardenerDensity / resinDensity
  if (by === 'volume') return { volume: ratio, weight: heavier === null ? null : ratio * heavier }
  return { weight: ratio, volume: heavier === null ? null : ratio / heavier }
}

/**
 * How much denser the hardener is than its resin, from a ratio that is known both ways: (weight ratio) / (volume ratio).
 * 2 : 1 by volume and 100 : 44 by weight make 0.88.
 * @source Epoxy ratio scale, Duckworks, 2005
 */
export function densityRatio(volume: readonly [resin: number, hardener: number], weight: readonly [resin: number, hardener: number]): number {
  return weight[1] / weight[0] / (volume[1] / volume[0])
}

/** A whole in two parts, the second `ratio` to one of the first. */
export function partsOf(whole: number, ratio: number): [resin: number, hardener: number] {
  return [whole / (1 + ratio), whole * ratio / (1 + ratio)]
}

/** Density of resin and hardener together, g/mL: what they weigh over the room they take; null while a density is missing. */
export function mixedDensity(twoPart: TwoPart): number | null {
  const { volume } = hardenerToResin(twoPart)
  if (volume === null || twoPart.resinDensity === undefined || twoPart.hardenerDensity === undefined) return null
  return (twoPart.resinDensity + volume * twoPart.hardenerDensity) / (1 + volume)
}

/** Resin and hardener of a mix; null where a density would be needed. */
export interface TwoParts {
  /** mL. */
  volumes: { resin: number, hardener: number } | null
  /** g. */
  weights: { resin: number, hardener: number } | null
}

/**
 * Resin and hardener that make so much, both ways they can be measured.
 * @param ml of both together
 * @param density of both together, g/mL, for where theirs are not known
 */
export function twoParts(twoPart: TwoPart, ml: number, density: number): TwoParts {
  const { volume, weight } = hardenerToResin(twoPart)
  const split = (whole: number, ratio: number | null) => {
    if (ratio === null) return null
    const [resin, hardener] = partsOf(whole, ratio)
    return { resin, hardener }
  }
  return { volumes: split(ml, volume), weights: split(ml * (mixedDensity(twoPart) ?? density), weight) }
}
