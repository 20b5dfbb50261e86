/**
 * How much reducer goes with a paint, both ways it is said: "25 parts to 100" is 20 per cent of the mix. Common practice is to
 * store the parts and to show both, because the one is often taken for the other.
 */
export interface Thinning {
  /** Parts of reducer to 100 parts of paint, by volume. */
  partsPer100: number
  /** Reducer as a share of the mix, per cent. */
  shareOfMix: number
  /** Drops that come nearest with at most ten of paint. */
  drops: { paint: number, reducer: number }
  /** Volume solids of the mix, per cent, when the reducer leaves nothing behind. */
  solidsOfMix: number
}

const DROPS_MOST = 10

/**
 * Thinning of a paint.
 *
 * @param partsPer100 0 and over
 * @param volumeSolids of the paint as bought, per cent, above 0
 * @throws {RangeError} when a figure is out of range
 */
export function thinning(partsPer100: number, volumeSolids: number): Thinning {
  if (!(partsPer100 >= 0)) throw new RangeError(`Parts of reducer are 0 and over, got ${partsPer100}.`)
  if (!(volumeSolids > 0)) throw new RangeError(`Volume solids are above 0, got ${volumeSolids}.`)
  const ratio = partsPer100 / 100
  return { partsPer100, shareOfMix: 100 * ratio / (1 + ratio), drops: dropsFor(ratio), solidsOfMix: volumeSolids / (1 + ratio) }
}

function dropsFor(ratio: number): Thinning['drops'] {
  let best = { paint: DROPS_MOST, reducer: Math.round(ratio * DROPS_MOST) }
  // Fewer drops are taken only when they are no farther off.
  for (let paint = DROPS_MOST - 1; paint >= 1; paint--) {
    const reducer = Math.round(ratio * paint)
    if (Math.abs(reducer / paint - ratio) <= Math.abs(best.reducer / best.paint - ratio) + 1e-9) best = { paint, reducer }
  }
  return best
}
