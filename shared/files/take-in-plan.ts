import { z } from 'zod'

const Named = z.object({ name: z.string() })

/** What taking a scheme file in will do, or did. */
export const TakeInPlan = z.object({
  scheme: z.object({ name: z.string(), fish: z.string(), coats: z.number().int(), masks: z.number().int() }),
  /** A scheme of that name hangs on the wall already; both will. */
  nameIsTaken: z.boolean(),
  /** Paints in the order in which the file holds them: on the shelf already, by name and known colour, or put on it. */
  paints: z.array(Named.extend({
    is: z.enum(['on the shelf', 'new']),
    /** Where the paint on the shelf differs besides, or why a new one is made though the name is there. */
    because: z.string(),
  })),
  blanks: z.array(Named.extend({ is: z.enum(['here', 'new']) })),
  masks: z.array(Named.extend({ is: z.enum(['here', 'new']) })),
  revisions: z.array(z.number().int()),
  revisionsLeftOut: z.number().int(),
  /** What the taker should know, as sentences. */
  notes: z.array(z.string()),
})
export type TakeInPlan = z.output<typeof TakeInPlan>

/** The answer to a file: what it would do, or the scheme that now hangs on the wall. */
export const TakenIn = z.object({ schemeId: z.uuid().nullable(), plan: TakeInPlan })
export type TakenIn = z.output<typeof TakenIn>

/** Whether a file is only looked at. */
export const TakeInQuery = z.object({ dryRun: z.stringbool().default(false) })
export type TakeInQuery = z.output<typeof TakeInQuery>
