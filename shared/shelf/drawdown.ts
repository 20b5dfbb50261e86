import type { Lab, PaintKnown } from './paint'
import { colourWords } from '#shared/optics/colour-words'
import { CARD_BLACK, CARD_WHITE, groundFromLab } from '#shared/optics/known-film'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { hexFromSrgb } from '#shared/optics/screen-colour'
import { type Colour, promise, type Promised } from '#shared/optics/stack'
import type { Finish } from '#shared/optics/surface'

/** A colour of a drawdown as a page shows it. */
export interface Drawn {
  /** For `fill`: the nearest a screen comes. */
  hex: string
  lab: Lab
  words: string
  /** A screen cannot show it: say so beside it. */
  outOfGamut: boolean
}

/** One ground of a card at some passes: what is seen straight on, and a flake's face and flop. */
export interface DrawnOver extends Drawn { face?: Drawn, flop?: Drawn }

/** A card half black, half white, as read bare. */
export interface Card { black: Lab, white: Lab }

/** A step of a drawdown: so many passes over each half. */
export interface DrawdownStep { passes: number, overBlack: DrawnOver, overWhite: DrawnOver }

/** Passes a paint's page shows. */
export const DRAWDOWN_PASSES: readonly number[] = [1, 2, 3, 4, 5, 6]

/** The card a paint was read on where its bare grounds were read too; a usual one otherwise. */
export function cardOf(known?: PaintKnown): Card {
  const read = known?.how === 'two-swatches' ? known : undefined
  return { black: read?.blackGround ?? CARD_BLACK, white: read?.whiteGround ?? CARD_WHITE }
}

/** Colour of a bare half of a card. */
export function bareGround(ground: Lab): Drawn {
  return drawn(promise({ ground: groundFromLab(ground), coats: [], finish: 'gloss' }))
}

/** What a paint looks like over one ground after some passes. */
export function drawnOver(optics: PaintOptics, ground: Lab, passes: number, finish: Finish = 'gloss'): DrawnOver {
  const seen: Promised = promise({ ground: groundFromLab(ground), coats: [{ optics, passes }], finish })
  return { ...drawn(seen), ...(seen.face && seen.flop ? { face: drawn(seen.face), flop: drawn(seen.flop) } : {}) }
}

/** A let-down over black and over white. */
export function drawdown(optics: PaintOptics, card: Card = cardOf(), passes: readonly number[] = DRAWDOWN_PASSES, finish: Finish = 'gloss'): DrawdownStep[] {
  return passes.map(count => ({
    passes: count,
    overBlack: drawnOver(optics, card.black, count, finish),
    overWhite: drawnOver(optics, card.white, count, finish),
  }))
}

/** A colour typed or picked by a person, as the screen shows it. */
export function drawnLab(lab: Lab): Drawn {
  return bareGround([Math.min(100, lab[0]), lab[1], lab[2]])
}

function drawn({ lab, srgb, outOfGamut }: Pick<Colour, 'lab' | 'srgb' | 'outOfGamut'>): Drawn {
  return { hex: hexFromSrgb([...srgb]), lab: [...lab], words: colourWords(lab), outOfGamut }
}
