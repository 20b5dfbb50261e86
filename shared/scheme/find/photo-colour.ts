import { type Lab, labFromXyz, type Rgb } from '#shared/optics/colorimetry'
import { decodeChannel, xyzFromLinearRgb } from '#shared/optics/screen-colour'

/** A photo as pixels: encoded sRGB, four bytes each. */
export interface PhotoPixels { width: number, height: number, data: ArrayLike<number> }

/** Light from a round place of a photo. */
export interface PhotoPlace {
  /** Mean of linear light, 0…1 a channel. */
  linear: Rgb
  /** Share of its pixels with a channel at either end of its range, where the camera saw no more. */
  clipped: number
}

/** A grey card sends back 18 per cent of the light in every colour: L* 49.5. Common practice; its maker may say otherwise. */
export const GREY_CARD = 0.18
/** More clipped pixels than this and a place tells nothing. */
const CLIPPED_MOST = 0.1
/** A card darker than this in a channel, linear, is not lit well enough to correct by. */
const CARD_LEAST = 0.01

/** Reads the mean light of a disk. Light is averaged, not its code: the mean of codes is too dark. */
export function readPlace({ width, height, data }: PhotoPixels, x: number, y: number, radius: number): PhotoPlace {
  const sum: Rgb = [0, 0, 0]
  let count = 0, clipped = 0
  for (let row = Math.max(0, Math.floor(y - radius)); row <= Math.min(height - 1, Math.ceil(y + radius)); row++) {
    for (let column = Math.max(0, Math.floor(x - radius)); column <= Math.min(width - 1, Math.ceil(x + radius)); column++) {
      if ((column - x) ** 2 + (row - y) ** 2 > radius ** 2) continue
      const at = 4 * (row * width + column)
      const codes = [data[at]!, data[at + 1]!, data[at + 2]!] as const
      codes.forEach((code, channel) => {
        sum[channel]! += DECODED[code]!
      })
      if (Math.max(...codes) >= 254 || Math.min(...codes) <= 1) clipped++
      count++
    }
  }
  return count === 0 ? { linear: [0, 0, 0], clipped: 1 } : { linear: [sum[0] / count, sum[1] / count, sum[2] / count], clipped: clipped / count }
}

const DECODED = Float64Array.from({ length: 256 }, (_, code) => decodeChannel(code / 255))

/** A colour read off a photo, or the reason why none can be, as a sentence. */
export type PhotoColour = { ok: true, lab: Lab } | { ok: false, because: string }

/**
 * The colour of a place in a photo that also shows a grey card in the same light: each channel is brought to where the card
 * belongs, in linear light. A guide: a camera does not see as an eye does, and its own rendering stays in the figures.
 *
 * @param reflectance what the card sends back, 0…1
 */
export function photoColour(card: PhotoPlace, place: PhotoPlace, reflectance = GREY_CARD): PhotoColour {
  if (card.clipped > CLIPPED_MOST) return { ok: false, because: 'The grey card is burnt out or black in this photo. Take it again with less light on the card, or in even light.' }
  if (Math.min(...card.linear) < CARD_LEAST) return { ok: false, because: 'What was tapped as the grey card is too dark to be one. Tap the middle of the card.' }
  if (place.clipped > CLIPPED_MOST) return { ok: false, because: 'The place is burnt out or black in this photo, so its colour is not in it. Tap beside the glare.' }
  const right = place.linear.map((value, channel) => value * reflectance / card.linear[channel]!) as Rgb // three of three
  const lab = labFromXyz(xyzFromLinearRgb(right))
  if (lab[0] > 105) return { ok: false, because: 'The place comes out far brighter than white. Is the grey card in the same light?' }
  return { ok: true, lab: [Math.min(100, lab[0]), lab[1], lab[2]] }
}
