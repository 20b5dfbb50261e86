import { z } from 'zod'
import { COATS_MAX, MASKS_MAX, StackItem } from './body'
import { Mask } from './mask'
import { coatsOf, stackFaults } from './stack-order'

export const BUILD_UP_NAME_MAX = 80

/** Coats in order with the masks they are laid through: what can be cut out of one finish and laid into another. */
export const BuildUpSequence = z.object({
  stack: z.array(StackItem).min(1, 'A build-up has at least one coat.').max(COATS_MAX + 2 * MASKS_MAX),
  masks: z.array(Mask).max(MASKS_MAX),
}).superRefine((sequence, context) => {
  if (coatsOf(sequence.stack).length === 0) context.addIssue({ code: 'custom', path: ['stack'], message: 'A build-up has at least one coat.' })
  for (const fault of stackFaults(sequence)) context.addIssue({ code: 'custom', path: fault.row === undefined ? ['masks'] : ['stack', fault.row], message: fault.sentence })
})
export type BuildUpSequence = z.output<typeof BuildUpSequence>

const Name = z.string().trim().min(1, 'A build-up needs a name.').max(BUILD_UP_NAME_MAX, `A name has at most ${BUILD_UP_NAME_MAX} characters.`)

/** A build-up as somebody saves it: "scaled flank over black". */
export const BuildUpDraft = z.object({ name: Name, sequence: BuildUpSequence })
export type BuildUpDraft = z.output<typeof BuildUpDraft>

/** Another name, other coats; putting it away, or bringing it back. */
export const BuildUpChange = z.object({ name: Name.optional(), sequence: BuildUpSequence.optional(), retired: z.boolean().optional() })
export type BuildUpChange = z.output<typeof BuildUpChange>

/** A build-up of the workshop. */
export const BuildUpView = BuildUpDraft.extend({
  id: z.uuid(),
  /** Rises when its coats change; another name leaves it. */
  edition: z.number().int(),
  version: z.number().int(),
  retired: z.boolean(),
  changedAt: z.iso.datetime(),
})
export type BuildUpView = z.output<typeof BuildUpView>

export const BuildUpParams = z.object({ buildUpId: z.uuid() })
