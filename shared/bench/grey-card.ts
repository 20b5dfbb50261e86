import type { PatchRgb } from './run-measure'
import { type Lab, labFromXyz } from '#shared/optics/colorimetry'
import { decodeChannel, xyzFromLinearRgb } from '#shared/optics/screen-colour'

/** Reflectance of a photographer's grey card: L* 49.5, sRGB 118 (18 % grey; common practice of photography). */
export const CARD_REFLECTANCE = 0.18

/** A card this dark or this bright in the photo, 0 to 255, tells too little of its colour. */
const CARD_LEAST = 25
const CARD_MOST = 245

/**
 * Colour of a patch of a photo, CIELAB D65, taken from a grey card in the same light: each channel is scaled until the card is
 * neutral and sends back 18 %. A guide, not a measurement: a camera's colours are not the observer's, gloss and flakes depend on
 * where lamp and camera stand, and what is clipped in the photo is lost.
 * @throws {RangeError} when the card is too dark or too bright in the photo to go by
 */
export function labFromPatch(patch: PatchRgb, card: PatchRgb): Lab {
  if (card.some(code => code < CARD_LEAST || code > CARD_MOST)) throw new RangeError('The grey card is too dark or too bright in this photo to go by. Take it again, card and piece in the same light.')
  const channel = (n: 0 | 1 | 2) => decodeChannel(patch[n] / 255) * CARD_REFLECTANCE / decodeChannel(card[n] / 255)
  return labFromXyz(xyzFromLinearRgb([channel(0), channel(1), channel(2)]))
}
