import { z } from 'zod'
import { PASSES_MAX } from '#shared/scheme/coat'

export const PIECES_MAX = 200
export const DEVIATION_NOTE_MAX = 500
/** Acts handed over at once. */
export const EVENTS_MAX = 200

/** Names a step of a run: `lay:<coat id>`, `fit:<mask id>`, `inspect` and so on (see `run-steps.ts`). */
export const StepId = z.string().min(1).max(80)
/** One lure of a run, counted from 1. */
export const Piece = z.number().int().min(1).max(PIECES_MAX)
const Pieces = z.array(Piece).min(1).max(PIECES_MAX)
const Note = z.string().trim().max(DEVIATION_NOTE_MAX)

/** What bench painters do differently, by what was different. */
export const DEVIATION_KINDS = ['passes', 'thinning', 'paint', 'wait', 'other'] as const
export const DeviationKind = z.enum(DEVIATION_KINDS)
export type DeviationKind = z.output<typeof DeviationKind>

/**
 * One act at the bench. Acts add up and are never changed: to take one back is an act of its own.
 * Where pieces are left out, the act is for every piece of the run. `v` is the form of the act; old tablets send old forms.
 */
export const RunAct = z.discriminatedUnion('kind', [
  /** So many passes of a coat, on each of these pieces. */
  z.object({ v: z.literal(1), kind: z.literal('pass-laid'), coatId: z.uuid(), pieces: Pieces, passes: z.number().int().min(1).max(PASSES_MAX) }),
  /** These pieces are through with a step and go on. `starts` names the wait that begins for them with it. */
  z.object({ v: z.literal(1), kind: z.literal('step-done'), stepId: StepId, pieces: Pieces.optional(), starts: StepId.optional() }),
  /** A wait was started by hand, or anew; its end follows from the step. */
  z.object({ v: z.literal(1), kind: z.literal('wait-started'), stepId: StepId, pieces: Pieces.optional() }),
  z.object({ v: z.literal(1), kind: z.literal('deviation'), stepId: StepId, what: DeviationKind, note: Note.min(1), pieces: Pieces.optional() }),
  z.object({ v: z.literal(1), kind: z.literal('piece-set-aside'), piece: Piece, reason: Note.min(1) }),
  z.object({ v: z.literal(1), kind: z.literal('piece-taken-up'), piece: Piece }),
  z.object({ v: z.literal(1), kind: z.literal('inspected'), pieces: Pieces, passed: z.boolean(), note: Note }),
  z.object({ v: z.literal(1), kind: z.literal('run-finished') }),
  /** Undoes one earlier act; a take-back itself cannot be taken back. */
  z.object({ v: z.literal(1), kind: z.literal('taken-back'), eventId: z.uuid() }),
])
export type RunAct = z.output<typeof RunAct>
export type RunActKind = RunAct['kind']

/** An act with the id its tablet gave it and the time on that tablet's clock. */
export const RunEvent = z.object({ id: z.uuid(), doneAt: z.iso.datetime(), act: RunAct })
export type RunEvent = z.output<typeof RunEvent>

/** Acts handed over together, oldest first. */
export const RunEventBatch = z.object({ events: z.array(RunEvent).min(1).max(EVENTS_MAX) })
export type RunEventBatch = z.output<typeof RunEventBatch>

/** An answer for each act handed over: taken (now or already), or refused with the reason. */
export const RunEventAnswer = z.discriminatedUnion('taken', [
  z.object({ id: z.uuid(), taken: z.literal(true) }),
  z.object({ id: z.uuid(), taken: z.literal(false), reason: z.string() }),
])
export type RunEventAnswer = z.output<typeof RunEventAnswer>
