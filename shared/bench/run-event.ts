import { z } from 'zod'

export const PIECES_MAX = 200
export const DEVIATION_NOTE_MAX = 500
/** Events handed over at once. */
export const EVENTS_MAX = 200

/** Names a step of a run: `lay:<coat id>`, `fit:<mask id>`, `inspect` and so on (see `run-steps.ts`). */
export const StepId = z.string().min(1).max(80)
const Piece = z.number().int().min(1).max(PIECES_MAX)

/** What bench painters do differently, by what was different. */
export const DEVIATION_KINDS = ['passes', 'thinning', 'paint', 'wait', 'other'] as const
export const DeviationKind = z.enum(DEVIATION_KINDS)
export type DeviationKind = z.output<typeof DeviationKind>

/**
 * One act at the bench. Acts add up in any order and are never changed: to take one back is an act of its own.
 * `v` is the form of the act; old tablets send old forms.
 */
export const RunAct = z.discriminatedUnion('kind', [
  /** So many passes of a coat on one piece. */
  z.object({ v: z.literal(1), kind: z.literal('pass-laid'), coatId: z.uuid(), piece: Piece, passes: z.number().int().min(1).max(30) }),
  /** A step that is done once for all pieces: mixed, fitted, rested, lifted, cleaned out. */
  z.object({ v: z.literal(1), kind: z.literal('step-done'), stepId: StepId }),
  /** A wait began; its end follows from the step. */
  z.object({ v: z.literal(1), kind: z.literal('wait-started'), stepId: StepId }),
  z.object({ v: z.literal(1), kind: z.literal('deviation'), stepId: StepId, what: DeviationKind, note: z.string().trim().min(1).max(DEVIATION_NOTE_MAX) }),
  z.object({ v: z.literal(1), kind: z.literal('piece-set-aside'), piece: Piece, reason: z.string().trim().min(1).max(DEVIATION_NOTE_MAX) }),
  z.object({ v: z.literal(1), kind: z.literal('piece-taken-up'), piece: Piece }),
  z.object({ v: z.literal(1), kind: z.literal('inspected'), piece: Piece, passed: z.boolean(), note: z.string().trim().max(DEVIATION_NOTE_MAX) }),
  z.object({ v: z.literal(1), kind: z.literal('run-finished') }),
  /** Undoes one earlier act. */
  z.object({ v: z.literal(1), kind: z.literal('taken-back'), eventId: z.uuid() }),
])
export type RunAct = z.output<typeof RunAct>

/** An act with the id its tablet gave it and the time on that tablet's clock. */
export const RunEvent = z.object({ id: z.uuid(), doneAt: z.iso.datetime(), act: RunAct })
export type RunEvent = z.output<typeof RunEvent>

/** Acts handed over together, oldest first. */
export const RunEventBatch = z.object({ events: z.array(RunEvent).min(1).max(EVENTS_MAX) })

/** An answer for each act handed over: taken (now or already), or set aside with the reason. */
export const RunEventAnswer = z.discriminatedUnion('taken', [
  z.object({ id: z.uuid(), taken: z.literal(true) }),
  z.object({ id: z.uuid(), taken: z.literal(false), reason: z.string() }),
])
export type RunEventAnswer = z.output<typeof RunEventAnswer>
