import { z } from 'zod'
import { MaskForm, MASK_NAME_MAX } from './mask'

export const MaskParams = z.object({ maskId: z.uuid() })

/** A mesh or stencil of the workshop's own. */
export const MaskDraft = z.object({ name: z.string().trim().min(1).max(MASK_NAME_MAX), form: MaskForm })
export type MaskDraft = z.output<typeof MaskDraft>

export const MaskChange = MaskDraft.extend({ retired: z.boolean().optional() })
export type MaskChange = z.output<typeof MaskChange>

export const MaskView = MaskDraft.extend({ id: z.uuid(), retired: z.boolean(), version: z.number().int() })
export type MaskView = z.output<typeof MaskView>
