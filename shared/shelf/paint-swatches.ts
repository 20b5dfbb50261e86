import type { PaintSwatches } from './paint-view'
import { cardOf, drawnOver, type DrawnOver } from './drawdown'
import type { PaintOptics } from '#shared/optics/paint-optics'

const CARD_PASSES = 2
/** So many passes hide any ground that the paint can hide. */
const MASSTONE_PASSES = 40

/** How a paint looks by itself: its masstone (over white for what never hides), two passes over black and over white, and a flake's face and flop. */
export function paintSwatches(optics: PaintOptics): PaintSwatches {
  const card = cardOf()
  const overBlack = drawnOver(optics, card.black, CARD_PASSES)
  const overWhite = drawnOver(optics, card.white, CARD_PASSES)
  const own = ownColour(optics, overBlack, overWhite)
  return {
    masstone: own.hex,
    overBlack: overBlack.hex,
    overWhite: overWhite.hex,
    ...(overBlack.face && overBlack.flop ? { face: overBlack.face.hex, flop: overBlack.flop.hex } : {}),
    words: own.words,
    lab: own.lab,
  }
}

/** A flake is its face, a see-through paint its look over white, anything else its masstone. */
function ownColour(optics: PaintOptics, overBlack: DrawnOver, overWhite: DrawnOver) {
  if (overBlack.face) return overBlack.face
  if (optics.kind === 'clear' || optics.how === 'dye-over-white') return overWhite
  return drawnOver(optics, cardOf().black, MASSTONE_PASSES)
}
