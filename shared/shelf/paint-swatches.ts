import type { PaintSwatches } from './paint-view'
import { colourWords } from '#shared/optics/colour-words'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { hexFromSrgb } from '#shared/optics/screen-colour'
import { promise, type Promised } from '#shared/optics/stack'
import { groundFromLab } from '#shared/optics/known-film'
import type { Lab } from './paint'

/** Bare grounds of a drawdown card as they are usually printed, CIELAB (common practice). */
export const CARD_BLACK: Lab = [9, 0, 0]
export const CARD_WHITE: Lab = [94, 0, 1]

const CARD_PASSES = 2
/** So many passes hide any ground that the paint can hide. */
const MASSTONE_PASSES = 40

function drawdown(optics: PaintOptics, ground: Lab, passes: number): Promised {
  return promise({ ground: groundFromLab(ground), coats: [{ optics, passes }], finish: 'gloss' })
}

/** How a paint looks by itself: its masstone (over white for what never hides), two passes over black and over white, and a flake's face and flop. */
export function paintSwatches(optics: PaintOptics): PaintSwatches {
  const overBlack = drawdown(optics, CARD_BLACK, CARD_PASSES)
  const overWhite = drawdown(optics, CARD_WHITE, CARD_PASSES)
  const own = ownColour(optics, overBlack, overWhite)
  return {
    masstone: hexFromSrgb(own.srgb),
    overBlack: hexFromSrgb(overBlack.srgb),
    overWhite: hexFromSrgb(overWhite.srgb),
    ...(overBlack.face && overBlack.flop ? { face: hexFromSrgb(overBlack.face.srgb), flop: hexFromSrgb(overBlack.flop.srgb) } : {}),
    words: colourWords(own.lab),
    lab: [...own.lab],
  }
}

/** A flake is its face, a see-through paint its look over white, anything else its masstone. */
function ownColour(optics: PaintOptics, overBlack: Promised, overWhite: Promised) {
  if (overBlack.face) return overBlack.face
  if (optics.kind === 'clear' || optics.how === 'dye-over-white') return overWhite
  return drawdown(optics, CARD_BLACK, MASSTONE_PASSES)
}
