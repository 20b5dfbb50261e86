import type { PaintSwatches, SwatchSpread } from './paint-view'
import { cardOf, type Drawn, drawnOver } from './drawdown'
import { groundFromLab } from '#shared/optics/known-film'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { promiseSpread } from '#shared/optics/spread'
import type { Lab } from './paint'

const CARD_PASSES = 2
/** So many passes hide any ground that the paint can hide. */
const MASSTONE_PASSES = 40

/** How a paint looks by itself: its masstone (over white for what never hides), two passes over black and over white, and a flake's face and flop. */
export function paintSwatches(optics: PaintOptics): PaintSwatches {
  const card = cardOf()
  const overBlack = drawnOver(optics, card.black, CARD_PASSES)
  const overWhite = drawnOver(optics, card.white, CARD_PASSES)
  const own = ownColour(optics)
  return {
    masstone: own.hex,
    overBlack: overBlack.hex,
    overWhite: overWhite.hex,
    ...(overBlack.face && overBlack.flop ? { face: overBlack.face.hex, flop: overBlack.flop.hex } : {}),
    words: own.words,
    lab: own.lab,
    sure: { overBlack: swatchSpread(optics, card.black), overWhite: swatchSpread(optics, card.white) },
    ...(own.outOfGamut ? { unshown: true } : {}),
  }
}

/** How far off two passes by hand over one ground of a card may come out. */
function swatchSpread(optics: PaintOptics, ground: Lab): SwatchSpread {
  const { typical, most } = promiseSpread({ ground: groundFromLab(ground), coats: [{ optics, passes: CARD_PASSES }], finish: 'gloss' })
  return { typical, most }
}

/** Its own colour: a flake is its face, a see-through paint its look over white, anything else its masstone. Cheaper than all swatches. */
export function ownColour(optics: PaintOptics): Drawn {
  const { black, white } = cardOf()
  if (optics.flake) {
    const over = drawnOver(optics, black, CARD_PASSES)
    return over.face ?? over
  }
  if (optics.kind === 'clear' || optics.how === 'dye-over-white') return drawnOver(optics, white, CARD_PASSES)
  return drawnOver(optics, black, MASSTONE_PASSES)
}
