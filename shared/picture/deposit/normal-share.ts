const REACH = 4
const PER_UNIT = 128
const TABLE = cumulativeTable()

function cumulativeTable(): Float64Array {
  const table = new Float64Array(2 * REACH * PER_UNIT + 2)
  const density = (x: number) => Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI)
  const step = 1 / PER_UNIT
  const middle = REACH * PER_UNIT
  let sum = 0.5
  table[middle] = sum
  for (let i = 1; i <= middle; i++) {
    const x = (i - 1) * step
    sum += step / 6 * (density(x) + 4 * density(x + step / 2) + density(x + step))
    table[middle + i] = sum
    table[middle - i] = 1 - sum
  }
  table[2 * middle + 1] = 1
  return table
}

/**
 * Share of a normal spread below x: how much of a soft edge has been passed. x in units of its softness.
 * 0 below -4, 1 above 4; in between right to 2e-6 (the two cut tails hold 3e-5).
 */
export function normalShare(x: number): number {
  if (x <= -REACH) return 0
  if (x >= REACH) return 1
  const at = (x + REACH) * PER_UNIT
  const i = at | 0
  const low = TABLE[i] ?? 0
  return low + ((TABLE[i + 1] ?? 1) - low) * (at - i)
}

/** Smooth step from 0 at `from` to 1 at `to`; falls instead when `from` lies above `to`. */
export function smoothStep(from: number, to: number, x: number): number {
  const t = Math.min(1, Math.max(0, (x - from) / (to - from)))
  return t * t * (3 - 2 * t)
}
