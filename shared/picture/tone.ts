import { linearFromOklab, oklabFromLinear } from '#shared/optics/screen-colour'

/** Where bright light begins to bend, and how softly. Chosen by eye. */
export const KNEE = 0.8
export const SOFTNESS = 1.4
export const CHROMA_STEPS = 10
/** Light so far above white that its highlight is white whatever it lies on. */
export const WHITE_AT = 3.5

/** Bends what is brighter than `knee` so that it never reaches 1. */
function shoulder(value: number, knee: number): number {
  const room = 1 - knee
  return knee + room * (1 - Math.exp(-(value - knee) / (room * SOFTNESS)))
}

/** Brings the light of the paint alone, linear sRGB in three places of `rgb`, into what a screen can show; hue is kept. */
export function tonePaint(rgb: Float32Array, at: number): void {
  if (rgb[at]! < 0 || rgb[at + 1]! < 0 || rgb[at + 2]! < 0) lessChroma(rgb, at)
  const most = Math.max(rgb[at]!, rgb[at + 1]!, rgb[at + 2]!)
  if (most <= KNEE) return
  const scale = shoulder(most, KNEE) / most
  for (let c = 0; c < 3; c++) rgb[at + c]! *= scale
}

/** The same without bending: exactly the colour where a screen can show it. */
export function tonePlain(rgb: Float32Array, at: number): void {
  if (rgb[at]! < 0 || rgb[at + 1]! < 0 || rgb[at + 2]! < 0) lessChroma(rgb, at)
  const most = Math.max(rgb[at]!, rgb[at + 1]!, rgb[at + 2]!)
  if (most > 1) for (let c = 0; c < 3; c++) rgb[at + c]! /= most
}

/** A white in air. */
const WHITE = [1, 1, 1] as const

/**
 * Adds mirrored light to a colour that has been through `tonePaint`.
 *
 * What is far brighter than white turns white: whitening is for light that the surface mirrors, never for paint.
 *
 * @param white what a perfect white looks like there, linear sRGB
 */
export function addGloss(rgb: Float32Array, at: number, gloss: number, white: readonly number[] = WHITE): void {
  const before = Math.max(rgb[at]!, rgb[at + 1]!, rgb[at + 2]!)
  for (let c = 0; c < 3; c++) rgb[at + c]! += gloss * white[c]!
  const most = Math.max(rgb[at]!, rgb[at + 1]!, rgb[at + 2]!)
  const knee = Math.max(KNEE, Math.min(0.97, before))
  if (most <= knee) return
  const shown = shoulder(most, knee)
  const whitened = most > 1 ? Math.min(1, ((most - 1) / WHITE_AT) ** 0.8) : 0
  for (let c = 0; c < 3; c++) {
    const scaled = rgb[at + c]! * shown / most
    rgb[at + c] = scaled + (shown - scaled) * whitened
  }
}

function lessChroma(rgb: Float32Array, at: number): void {
  const [L, a, b] = oklabFromLinear([rgb[at]!, rgb[at + 1]!, rgb[at + 2]!])
  let low = 0, high = 1
  for (let i = 0; i < CHROMA_STEPS; i++) {
    const share = (low + high) / 2
    if (Math.min(...linearFromOklab([L, a * share, b * share])) >= 0) low = share
    else high = share
  }
  const shown = linearFromOklab([L, a * low, b * low])
  for (let c = 0; c < 3; c++) rgb[at + c] = Math.max(0, shown[c]!)
}
