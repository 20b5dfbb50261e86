/** A fish whose scales are imitated, and its scales along the lateral line as field guides count them (common practice). */
export interface ScaledFish { fish: string, scales: readonly [from: number, to: number] }

export const SCALED_FISH: readonly ScaledFish[] = [
  { fish: 'yellow perch', scales: [50, 70] },
  { fish: 'bluegill', scales: [39, 44] },
  { fish: 'golden shiner', scales: [44, 54] },
  { fish: 'roach', scales: [39, 48] },
]

/** Share of a body that is scaled: all but the head and the root of the tail. */
export const SCALED_SHARE = 0.7
/** Painters often take about double, since true scales hardly read on a small lure (common practice). */
export const FOR_LOOKS = 2

/** Pitch of a net, mm: as on the fish, and as painters often take it. */
export interface ScalePitch { true: number, forLooks: number }

/**
 * Pitch that puts as many scales on a lure as on the fish: scaled length ÷ scales along the lateral line (common practice).
 *
 * @param length of the lure without fins, mm, above 0
 * @param scales along the lateral line, above 0
 * @throws {RangeError} when a figure is not above 0
 */
export function scalePitch(length: number, scales: number): ScalePitch {
  if (!(length > 0)) throw new RangeError(`A lure's length is above 0, got ${length}.`)
  if (!(scales > 0)) throw new RangeError(`A count of scales is above 0, got ${scales}.`)
  const pitch = SCALED_SHARE * length / scales
  return { true: pitch, forLooks: FOR_LOOKS * pitch }
}
