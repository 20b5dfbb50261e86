import type { PictureOptions } from '../picture-options'
import type { Look } from '../look'
import type { LightSheet } from './light-sheet'
import type { FormedSheet, TurnPaint } from './turn-bench'
import type { TurnForm } from './turn-form'

// A page and its thread are one program, so what they say to one another is held by its types alone: a check at the border would cost
// every request some milliseconds, and every page the download of the checker.

/** What the turning view asks of its thread: a look, what of it is shown, and how fine. The newest request takes over. */
export interface TurnAsk extends Pick<PictureOptions, 'upTo' | 'clear' | 'light' | 'seen'> {
  /** Rises with every request. */
  request: number
  look: Look
  /** Texels to the mm. */
  scale: number
}

/** How fine sheets are. */
export type TurnStage = 'coarse' | 'fine'

/** What its thread answers, in this order; what has not changed is left out. */
export type TurnAnswer
  = | { answer: 'form', request: number, form: TurnForm }
    | { answer: 'sheets', request: number, body: FormedSheet, fins: FormedSheet | undefined }
    | { answer: 'light', request: number, light: LightSheet }
    | { answer: 'paint', request: number, stage: TurnStage, paint: TurnPaint }
    /** All that this request asked for has been sent. */
    | { answer: 'done', request: number }
    | { answer: 'failed', request: number, reason: string }

/** The buffers of an answer that are handed over and not copied. */
export function turnTransfer(value: unknown): ArrayBuffer[] {
  if (ArrayBuffer.isView(value)) return value.buffer instanceof ArrayBuffer ? [value.buffer] : []
  if (typeof value !== 'object' || value === null) return []
  return [...new Set(Object.values(value).flatMap(turnTransfer))]
}
