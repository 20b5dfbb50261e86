import type { Lab } from './colorimetry'

const RADIANS = Math.PI / 180
/** 25 to the seventh power, from which the formula's chroma terms bend. */
const BEND = 25 ** 7

/**
 * Difference between two colours, CIEDE2000 with all factors 1: about 1 is barely seen.
 *
 * @accuracy the 34 published pairs to their four decimals, in both orders
 * @source G. Sharma, W. Wu, E. N. Dalal, "The CIEDE2000 color-difference formula: implementation notes, supplementary test
 *         data, and mathematical observations", Color Res. Appl. 30 (2005) 21–30
 */
export function deltaE2000([L1, a1, b1]: Lab, [L2, a2, b2]: Lab): number {
  const meanC7 = ((Math.hypot(a1, b1) + Math.hypot(a2, b2)) / 2) ** 7
  const stretch = 1.5 - 0.5 * Math.sqrt(meanC7 / (meanC7 + BEND))
  const C1 = Math.hypot(a1 * stretch, b1)
  const C2 = Math.hypot(a2 * stretch, b2)
  const h1 = hueDegrees(a1 * stretch, b1)
  const h2 = hueDegrees(a2 * stretch, b2)

  const hueless = C1 * C2 === 0
  const dh = hueless ? 0 : turn(h2 - h1)
  const dL = L2 - L1
  const dC = C2 - C1
  const dH = 2 * Math.sqrt(C1 * C2) * Math.sin(dh / 2 * RADIANS)

  const L = (L1 + L2) / 2
  const C = (C1 + C2) / 2
  const h = hueless ? h1 + h2 : middleHue(h1, h2)
  const T = 1 - 0.17 * Math.cos((h - 30) * RADIANS) + 0.24 * Math.cos(2 * h * RADIANS)
    + 0.32 * Math.cos((3 * h + 6) * RADIANS) - 0.20 * Math.cos((4 * h - 63) * RADIANS)

  const lift = (L - 50) ** 2
  const SL = 1 + 0.015 * lift / Math.sqrt(20 + lift)
  const SC = 1 + 0.045 * C
  const SH = 1 + 0.015 * C * T
  const C7 = C ** 7
  const RC = 2 * Math.sqrt(C7 / (C7 + BEND))
  const RT = -RC * Math.sin(60 * Math.exp(-(((h - 275) / 25) ** 2)) * RADIANS)

  const l = dL / SL, c = dC / SC, t = dH / SH
  // Rounding can leave the sum a hair below zero for equal colours.
  return Math.sqrt(Math.max(0, l * l + c * c + t * t + RT * c * t))
}

/** Straight distance in L*, a*, b*, as the oldest formula has it (CIE 1976). */
export function deltaE1976([L1, a1, b1]: Lab, [L2, a2, b2]: Lab): number {
  return Math.hypot(L2 - L1, a2 - a1, b2 - b1)
}

function hueDegrees(a: number, b: number): number {
  if (a === 0 && b === 0) return 0
  const h = Math.atan2(b, a) / RADIANS
  return h < 0 ? h + 360 : h
}

/** Brings a difference of hues into −180…180. */
function turn(dh: number): number {
  if (dh > 180) return dh - 360
  return dh < -180 ? dh + 360 : dh
}

function middleHue(h1: number, h2: number): number {
  const sum = h1 + h2
  if (Math.abs(h1 - h2) <= 180) return sum / 2
  return sum < 360 ? (sum + 360) / 2 : (sum - 360) / 2
}
