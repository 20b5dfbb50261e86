import type { LaidTable } from '../compose'
import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'

/** Most spreads of flakes that are told apart; nearer ones are taken together. */
export const FLAKE_GROUPS_MAX = 2
/** Cosines between light and flake at which a sheet keeps what flakes mirror: toward the gloss, between, and far from it. */
export const SHEET_COSINES: readonly [number, number, number] = [1, 0.85, 0.7]
/** Rows of a coat's table, even in the cosine. */
export const TABLE_ROWS = FLAKE_TABLE_COSINES.length

/** Spreads of tilt, degrees, of the flakes in a stack: one for each group, in rising order. */
export function flakeGroups(coats: readonly LaidTable[]): number[] {
  const groups = [...new Set(coats.flatMap(({ table }) => table.flake ? [table.flake.sigma] : []))].sort((a, b) => a - b)
  while (groups.length > FLAKE_GROUPS_MAX) {
    const gaps = groups.slice(1).map((sigma, i) => sigma - groups[i]!)
    const at = gaps.indexOf(Math.min(...gaps))
    groups.splice(at, 2, (groups[at]! + groups[at + 1]!) / 2)
  }
  return groups
}

/** The group a spread belongs to. */
export function groupOf(groups: readonly number[], sigma: number): number {
  let best = 0
  groups.forEach((group, i) => {
    if (Math.abs(group - sigma) < Math.abs(groups[best]! - sigma)) best = i
  })
  return best
}

/** Weights of a sheet's three rows at a local cosine: a parabola through them. */
export function rowWeights(cosine: number): [near: number, between: number, far: number] {
  const x = Math.min(1, Math.max(0, (1 - cosine) / (1 - SHEET_COSINES[2])))
  return [(1 - x) * (1 - 2 * x), 4 * x * (1 - x), x * (2 * x - 1)]
}
