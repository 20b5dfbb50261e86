import { z } from 'zod'
import { DROPS_MAX, PASSES_MAX } from '#shared/scheme/coat'

export const PIECES_MAX = 200
export const DEVIATION_NOTE_MAX = 500
/** Acts handed over at once. */
export const EVENTS_MAX = 200
/** Longest wait that can be set, seconds: a week. */
export const WAIT_SECONDS_MAX = 7 * 24 * 3600
/** Highest place an act can have among those of its run. */
export const PLACE_MAX = 1_000_000

/** Names a step of a run: `lay:<coat id>`, `fit:<mask id>`, `inspect` and so on (see `run-steps.ts`). */
export const StepId = z.string().min(1).max(80)
/** One lure of a run, counted from 1. */
export const Piece = z.number().int().min(1).max(PIECES_MAX)
const Pieces = z.array(Piece).min(1).max(PIECES_MAX)
const Note = z.string().trim().max(DEVIATION_NOTE_MAX)
const WaitSeconds = z.number().int().min(0).max(WAIT_SECONDS_MAX)

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
  /** A wait takes so long for these pieces, whatever its step says: a timer that was made longer or shorter. */
  z.object({ v: z.literal(1), kind: z.literal('wait-set'), stepId: StepId, seconds: WaitSeconds, pieces: Pieces.optional() }),
  /** These pieces went on before their wait was over, so many seconds early. */
  z.object({ v: z.literal(1), kind: z.literal('wait-cut'), stepId: StepId, secondsLeft: WaitSeconds, pieces: Pieces.optional() }),
  z.object({ v: z.literal(1), kind: z.literal('deviation'), stepId: StepId, what: DeviationKind, note: Note.min(1), pieces: Pieces.optional() }),
  /** From now on this paint comes out of this bottle, and so this lot: in one coat, or in all of them. */
  z.object({ v: z.literal(1), kind: z.literal('bottle-used'), paintId: z.uuid(), bottleId: z.uuid(), coatId: z.uuid().optional() }),
  /** A coat was reduced otherwise: drops of reducer to the drops of its mix. */
  z.object({ v: z.literal(1), kind: z.literal('thinned'), coatId: z.uuid(), reducer: z.number().int().min(0).max(DROPS_MAX * 4), pieces: Pieces.optional() }),
  /** Another paint went into a coat in place of one of its mix, drop for drop. */
  z.object({ v: z.literal(1), kind: z.literal('paint-changed'), coatId: z.uuid(), from: z.uuid(), to: z.uuid(), pieces: Pieces.optional() }),
  /** A photo was taken at a step; the photo itself travels by itself and may come later. */
  z.object({ v: z.literal(1), kind: z.literal('photo-taken'), photoId: z.uuid(), stepId: StepId, pieces: Pieces.optional() }),
  z.object({ v: z.literal(1), kind: z.literal('piece-set-aside'), piece: Piece, reason: Note.min(1) }),
  z.object({ v: z.literal(1), kind: z.literal('piece-taken-up'), piece: Piece }),
  z.object({ v: z.literal(1), kind: z.literal('inspected'), pieces: Pieces, passed: z.boolean(), note: Note }),
  z.object({ v: z.literal(1), kind: z.literal('run-finished') }),
  /** Undoes one earlier act; a take-back itself cannot be taken back. */
  z.object({ v: z.literal(1), kind: z.literal('taken-back'), eventId: z.uuid() }),
])
export type RunAct = z.output<typeof RunAct>
export type RunActKind = RunAct['kind']

/**
 * An act with the id its tablet gave it and the time on that tablet's clock. `place` is one more than the highest place of any
 * act of the run the tablet knew when it was done: what was done knowing of something else comes after it, whatever the
 * clocks say and in whatever order acts arrive. Tablets of before gave none.
 */
export const RunEvent = z.object({ id: z.uuid(), doneAt: z.iso.datetime(), place: z.number().int().min(1).max(PLACE_MAX).optional(), act: RunAct })
export type RunEvent = z.output<typeof RunEvent>

/** The place of the next act of somebody who knows of these. */
export function nextPlace(known: readonly Pick<RunEvent, 'place'>[]): number {
  return Math.min(PLACE_MAX, known.reduce((highest, { place }) => Math.max(highest, place ?? 0), 0) + 1)
}

/** Acts handed over together, oldest first, with the time on the tablet's clock at that moment: the server sees from it how wrong the clock is. */
export const RunEventBatch = z.object({ events: z.array(RunEvent).min(1).max(EVENTS_MAX), sentAt: z.iso.datetime().optional() })
export type RunEventBatch = z.output<typeof RunEventBatch>

/** An answer for each act handed over: taken (now or already), or refused with the reason. */
export const RunEventAnswer = z.discriminatedUnion('taken', [
  z.object({ id: z.uuid(), taken: z.literal(true) }),
  z.object({ id: z.uuid(), taken: z.literal(false), reason: z.string() }),
])
export type RunEventAnswer = z.output<typeof RunEventAnswer>
