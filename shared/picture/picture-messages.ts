import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import type { EngineName } from './engine/picture-engine'
import type { LetDown, LetDownWish } from './let-down'
import type { Look } from './look'
import type { PickedPlace } from './pick-place'
import type { PictureStage } from './picture-bench'
import type { Picture, PictureOptions } from './picture-options'
import type { ZoneColour, ZoneSpread, ZoneWish } from './zone-colours'

// A page and its thread are one program, so what they say to one another is held by its types alone: a check at the border would cost
// every edit some milliseconds, and every page the download of the checker.

interface Asked<L> {
  /** Which picture, or which question, of the page. A later request for the same makes an earlier one pointless. */
  picture: string
  /** Rises with every request. */
  request: number
  look: L
}

type About<L> = Asked<L> & (
  | { ask: 'paint', options: PictureOptions }
  /** What lies at a place of the picture, pixels. */
  | { ask: 'pick', options: PictureOptions, x: number, y: number }
  /** The promised colours of every zone; then, if wanted, how sure each is. */
  | { ask: 'zones', wish: ZoneWish, sure: boolean }
  /** Colours of one coat over its ground, pass by pass. */
  | { ask: 'let-down', letDown: LetDownWish }
)

/** The page no longer shows this picture. */
interface Forget { ask: 'forget', picture: string }

/** What a page wants to know, with the whole look: how it travels is the thread's own business. */
export type PictureQuestion = About<Look> | Forget

/** What a page tells and asks the painting thread. Materials are many times a body, and the same from edit to edit: they travel once. */
export type PictureAsk = About<{ body: SchemeBody, materials: number }> | Forget
  /** Materials that looks are made with from now on, and that none is made with any more. */
  | { ask: 'know', materials: number, given: Materials } | { ask: 'unlearn', materials: number }

export type { PictureStage } from './picture-bench'

/** A picture as a page draws it: unpacked by the thread, so that the page only has to lay it on its canvas. */
export type ShownPicture = Omit<Picture, 'rgba'> & { bitmap: ImageBitmap }

/** What the painting thread answers. */
export type PictureAnswer
  = | { answer: 'painted', picture: string, request: number, stage: PictureStage, painted: ShownPicture, engine: EngineName }
    | { answer: 'picked', picture: string, request: number, place: PickedPlace | undefined }
    | { answer: 'zones', picture: string, request: number, zones: ZoneColour[] }
    | { answer: 'spreads', picture: string, request: number, spreads: ZoneSpread[] }
    | { answer: 'let-down', picture: string, request: number, letDown: LetDown }
    | { answer: 'failed', picture: string, request: number, reason: string }
