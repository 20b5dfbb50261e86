import type { Mesh } from '#shared/scheme/mask'

/** A fish whose scales are imitated, and its scales along the lateral line as field guides count them (common practice). */
export interface ScaledFish { fish: string, scales: readonly [from: number, to: number] }

export const SCALED_FISH: readonly ScaledFish[] = [
  { fish: 'yellow perch', scales: [50, 70] },
  { fish: 'bluegill', scales: [39, 44] },
  { fish: 'golden shiner', scales: [44, 54] },
  { fish: 'roach', scales: [39, 48] },
]

/** Place in the list of the fish a scheme is named for; 0 where none is. */
export function scaledFishOf(words: string): number {
  const said = words.toLowerCase()
  const whole = SCALED_FISH.findIndex(({ fish }) => said.includes(fish))
  const last = SCALED_FISH.findIndex(({ fish }) => said.split(/\W+/).includes(fish.split(' ').at(-1) ?? ''))
  return Math.max(0, whole >= 0 ? whole : last)
}

/** Share of a body that is scaled: all but the head and the root of the tail. */
export const SCALED_SHARE = 0.7
/** Painters often take about double, since true scales hardly read on a small lure (common practice). */
export const FOR_LOOKS = 2

/** Pitch of a net, mm: as on the fish, and as painters often take it. */
export interface ScalePitch { true: number, forLooks: number }

/**
 * Pitch along the body that puts as many scales on a lure as on the fish: scaled length ÷ scales along the lateral line (common practice).
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

/** Cells of a net as it is fitted, thread to thread, mm: along the body and round it. Its pitch is recorded relaxed. */
export function fittedCells({ pitch, stretch }: Pick<Mesh, 'pitch' | 'stretch'>): { along: number, round: number } {
  return { along: pitch * stretch, round: pitch }
}

/** Relaxed pitch of a net that, pulled by `stretch` along the body, stands at `fitted` mm there. */
export function relaxedPitch(fitted: number, stretch: number): number {
  return fitted / stretch
}
