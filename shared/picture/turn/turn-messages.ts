import { z } from 'zod'
import { SchemeBody } from '#shared/scheme/body'
import { Materials } from '#shared/scheme/materials'
import { PictureOptions } from '../picture-options'
import type { LightSheet } from './light-sheet'
import type { FormedSheet, TurnPaint } from './turn-bench'
import type { TurnForm } from './turn-form'

/** Coarsest and finest sheets a page may ask for, texels to the mm. */
export const SCALE = { least: 0.5, most: 24 }

/** What the turning view asks of its thread: a look, what of it is shown, and how fine. The newest request takes over. */
export const TurnAsk = PictureOptions.pick({ upTo: true, clear: true, light: true, seen: true }).extend({
  /** Rises with every request. */
  request: z.number().int(),
  look: z.object({ body: SchemeBody, materials: Materials }),
  scale: z.number().min(SCALE.least).max(SCALE.most),
})
export type TurnAsk = z.output<typeof TurnAsk>

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
