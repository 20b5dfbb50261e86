import { z } from 'zod'
import type { ZoneName } from '#shared/blank/zone-names'
import { PASSES_MAX } from '#shared/scheme/coat'
import { SchemeBody } from '#shared/scheme/body'
import { Materials } from '#shared/scheme/materials'
import type { LetDownStep } from './let-down'
import type { PickedPlace } from './pick-place'
import type { PictureStage } from './picture-bench'
import type { Picture } from './picture-options'
import { PictureOptions } from './picture-options'
import type { ZoneColour } from './zone-colours'

const Asked = z.object({
  /** Which picture, or which question, of the page. A later request for the same makes an earlier one pointless. */
  picture: z.string().min(1),
  /** Rises with every request. */
  request: z.number().int(),
  look: z.object({ body: SchemeBody, materials: Materials }),
})

/** What a page asks of the painting thread. */
export const PictureAsk = z.discriminatedUnion('ask', [
  Asked.extend({ ask: z.literal('paint'), options: PictureOptions }),
  /** What lies at a place of the picture, pixels. */
  Asked.extend({ ask: z.literal('pick'), options: PictureOptions, x: z.number(), y: z.number() }),
  /** The promised colours of every zone. */
  Asked.extend({ ask: z.literal('zones'), wish: PictureOptions.pick({ upTo: true, clear: true, light: true }) }),
  /** Colours of one coat over its ground, pass by pass. */
  Asked.extend({
    ask: z.literal('let-down'), coatId: z.uuid(), zone: z.string().transform(zone => zone as ZoneName), passesMost: z.number().int().min(0).max(PASSES_MAX), clear: z.boolean(),
  }),
  /** The page no longer shows this picture. */
  z.object({ ask: z.literal('forget'), picture: z.string().min(1) }),
])
export type PictureAsk = z.output<typeof PictureAsk>

export type { PictureStage } from './picture-bench'

/** What the painting thread answers. */
export type PictureAnswer
  = | { answer: 'painted', picture: string, request: number, stage: PictureStage, painted: Picture }
    | { answer: 'picked', picture: string, request: number, place: PickedPlace | undefined }
    | { answer: 'zones', picture: string, request: number, zones: ZoneColour[] }
    | { answer: 'let-down', picture: string, request: number, steps: LetDownStep[] }
    | { answer: 'failed', picture: string, request: number, reason: string }
