import { z } from 'zod'
import { BlankShape } from './blank-shape'

export const BLANK_NAME_MAX = 80

export const BlankParams = z.object({ blankId: z.uuid() })

/** A workshop's own blank: its name and its shape. */
export const BlankDraft = z.object({ name: z.string().trim().min(1).max(BLANK_NAME_MAX), shape: BlankShape })
export type BlankDraft = z.output<typeof BlankDraft>

export const BlankChange = BlankDraft.extend({ retired: z.boolean().optional() })
export type BlankChange = z.output<typeof BlankChange>

export const BlankView = BlankDraft.extend({
  id: z.uuid(),
  builtIn: z.boolean(),
  retired: z.boolean(),
  version: z.number().int(),
  schemes: z.number().int(),
})
export type BlankView = z.output<typeof BlankView>
