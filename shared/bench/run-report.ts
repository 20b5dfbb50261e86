import { z } from 'zod'
import { RunMeasureView, SampleRecord } from './run-measure'

/** What taking a run into its scheme did: words of what was taken, and of what could not be. */
export const TakenIn = z.object({
  schemeId: z.uuid(),
  /** The draft's version now. */
  version: z.number().int(),
  taken: z.array(z.string()),
  left: z.array(z.string()),
})
export type TakenIn = z.output<typeof TakenIn>

/** What a run took out of one bottle. */
export const LotUsed = z.object({
  paintId: z.uuid(),
  paintName: z.string(),
  /** Null where no bottle of the paint was on the shelf. */
  bottle: z.object({ id: z.uuid(), code: z.string(), lot: z.string() }).nullable(),
  /** mL as it comes from the bottle, worked out from passes and planning values. */
  ml: z.number(),
})
export type LotUsed = z.output<typeof LotUsed>

/** How one run of a scheme came out. */
export const RunYield = z.object({
  runId: z.uuid(),
  number: z.number().int(),
  revision: z.number().int(),
  finishedAt: z.iso.datetime().nullable(),
  pieces: z.number().int(),
  passed: z.number().int(),
  failed: z.number().int(),
  setAside: z.number().int(),
  /** Time at the bench, minutes: without the long waits. */
  benchMinutes: z.number(),
})
export type RunYield = z.output<typeof RunYield>

/** What the server adds to a run for who looks back on it. */
export const RunReport = z.object({
  lots: z.array(LotUsed),
  /** Newest first. */
  measures: z.array(RunMeasureView),
  /** The sample of the scheme; null while none is marked. */
  sample: SampleRecord.nullable(),
  /** Every run of the scheme, the newest first, this one among them. */
  yields: z.array(RunYield),
  /** The draft's version, to take the run into it; null for who may not. */
  draftVersion: z.number().int().nullable(),
})
export type RunReport = z.output<typeof RunReport>
