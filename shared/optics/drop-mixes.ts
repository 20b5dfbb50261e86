/** Drops of each paint of a set, in the order of the set; no smaller whole numbers make the same mix. */
export type Drops = readonly number[]

/**
 * All ways to put so many paints into a cup with whole drops, `dropsMost` at most in all; fewest drops first.
 *
 * @param paints each gets at least one drop
 */
export function dropMixes(paints: number, dropsMost: number): Drops[] {
  const found: Drops[] = []
  for (let total = paints; total <= dropsMost; total++) {
    for (const drops of splits(total, paints)) if (drops.reduce(commonDivisor) === 1) found.push(drops)
  }
  return found
}

/** Ways to share a number among so many, each at least 1. */
function splits(total: number, among: number): number[][] {
  if (among === 1) return [[total]]
  return Array.from({ length: total - among + 1 }, (_, i) => i + 1)
    .flatMap(first => splits(total - first, among - 1).map(rest => [first, ...rest]))
}

function commonDivisor(a: number, b: number): number {
  return b === 0 ? a : commonDivisor(b, a % b)
}

/** All sets of so many out of `count`, as indices in rising order. */
export function setsOf(size: number, count: number, from = 0): number[][] {
  if (size === 0) return [[]]
  return Array.from({ length: Math.max(0, count - from) }, (_, i) => from + i)
    .flatMap(first => setsOf(size - 1, count, first + 1).map(rest => [first, ...rest]))
}
