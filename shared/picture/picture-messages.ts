import { z } from 'zod'
import { SchemeBody } from '#shared/scheme/body'
import { Materials } from '#shared/scheme/materials'
import type { PickedPlace } from './pick-place'
import type { Picture } from './picture-options'
import { PictureOptions } from './picture-options'

const Asked = z.object({
  /** Which picture of the page. A later request for the same picture makes an earlier one pointless. */
  picture: z.string().min(1),
  /** Rises with every request. */
  request: z.number().int(),
  look: z.object({ body: SchemeBody, materials: Materials }),
  options: PictureOptions,
})

/** What a page asks of the painting thread. */
export const PictureAsk = z.discriminatedUnion('ask', [
  Asked.extend({ ask: z.literal('paint') }),
  /** What lies at a place of the picture, pixels. */
  Asked.extend({ ask: z.literal('pick'), x: z.number(), y: z.number() }),
  /** The page no longer shows this picture. */
  z.object({ ask: z.literal('forget'), picture: z.string().min(1) }),
])
export type PictureAsk = z.output<typeof PictureAsk>

/** How far a picture has come. */
export type PictureStage = 'coarse' | 'full' | 'refined'
export const PICTURE_STAGES: readonly PictureStage[] = ['coarse', 'full', 'refined']

/** What the painting thread answers. */
export type PictureAnswer
  = | { answer: 'painted', picture: string, request: number, stage: PictureStage, painted: Picture }
    | { answer: 'picked', picture: string, request: number, place: PickedPlace | undefined }
    | { answer: 'failed', picture: string, request: number, reason: string }
