import { z } from 'zod'
import { Coat } from './coat'
import { Mask } from './mask'
import { Lab } from '#shared/shelf/paint'

export const COATS_MAX = 60
export const MASKS_MAX = 20
export const ANSWERED_MAX = 200

/** What one does, in order, from the ground up: fit a mask, lay a coat, lift a mask. A mask keeps paint off every coat between its fit and its lift. */
export const StackItem = z.discriminatedUnion('act', [
  z.object({ act: z.literal('coat'), coat: Coat }),
  z.object({ act: z.literal('fit'), maskId: z.uuid() }),
  z.object({ act: z.literal('lift'), maskId: z.uuid() }),
])
export type StackItem = z.output<typeof StackItem>

/** The bare body as it comes to the bench. */
export const Ground = z.object({
  name: z.string().trim().min(1).max(60),
  colour: Lab,
  finish: z.enum(['matt', 'satin', 'gloss']),
})
export type Ground = z.output<typeof Ground>

/** Glued or painted eyes, fitted before the clear. */
export const Eyes = z.object({ iris: Lab, pupil: Lab, rim: Lab })
export type Eyes = z.output<typeof Eyes>

/** One finish: what a draft holds and a revision freezes. */
export const SchemeBody = z.object({
  format: z.literal(1),
  blankId: z.uuid(),
  ground: Ground,
  stack: z.array(StackItem).max(COATS_MAX + 2 * MASKS_MAX),
  masks: z.array(Mask).max(MASKS_MAX),
  eyes: Eyes.nullable(),
  /** Warnings of a second look that a painter has answered, by their keys; absent while there is none. */
  answered: z.array(z.string().max(200)).min(1).max(ANSWERED_MAX).optional(),
})
export type SchemeBody = z.output<typeof SchemeBody>
