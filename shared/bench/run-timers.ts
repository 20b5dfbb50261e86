import { partsOf, waitOf, wholeWait } from './run-parts'
import { isWait, type LayStep, type MixStep, type WaitStep } from './run-step'
import { isThrough, type RunPlan, type RunState } from './run-state'

/** A wait that some pieces are in. */
export interface RunTimer {
  /** The act that began it: lasting, so that it rings once. */
  eventId: string
  step: WaitStep
  pieces: number[]
  /** When it ends, ms. */
  endsAt: number
  /** How long it takes in all, ms. */
  whole: number
}

/** The waits of the pieces that stand at a waiting step, the one that ends first first. Pieces that went on early are in none. */
export function runTimers(plan: RunPlan, state: RunState): RunTimer[] {
  const timers = new Map<string, RunTimer>()
  for (const { step, pieces } of partsOf(plan, state)) {
    if (!step || !isWait(step)) continue
    for (const piece of pieces) {
      const wait = waitOf(step.id, piece, state)
      if (!wait) continue
      const whole = wholeWait(step, piece, state)
      // Pieces of one batch whose wait was set otherwise run under a timer of their own.
      const key = `${wait.eventId} ${whole}`
      const timer = timers.get(key) ?? { eventId: wait.eventId, step, pieces: [], endsAt: Date.parse(wait.at) + whole, whole }
      timer.pieces.push(piece)
      timers.set(key, timer)
    }
  }
  return [...timers.values()].sort((a, b) => a.endsAt - b.endsAt)
}

/** Milliseconds a timer still runs, 0 once it has ended; a clock behind the one that started it never shows more than the whole. */
export function timerLeft({ endsAt, whole }: Pick<RunTimer, 'endsAt' | 'whole'>, now: number): number {
  return Math.min(whole, Math.max(0, endsAt - now))
}

/** What is in the cup now. */
export interface CupNow {
  step: MixStep
  /** When it was mixed, ms. */
  mixedAt: number
  /** When it sets, ms; null for what does not. */
  setsAt: number | null
}

/** The cup that was mixed last among those whose coats are not yet on every piece; undefined when there is none. */
export function cupNow(plan: RunPlan, state: RunState): CupNow | undefined {
  const parts = partsOf(plan, state)
  const isWanted = (mix: MixStep) => plan.steps.some(step => step.kind === 'lay' && isFrom(mix, step)
    && parts.some(part => part.pieces.some(piece => !isThrough(step, piece, state))))
  return plan.steps.flatMap((step): CupNow[] => {
    const done = state.done.get(step.id)
    if (step.kind !== 'mix' || !done || !isWanted(step)) return []
    const mixedAt = Date.parse(done.at)
    return [{ step, mixedAt, setsAt: step.potLifeMinutes === null ? null : mixedAt + step.potLifeMinutes * 60_000 }]
  }).sort((a, b) => b.mixedAt - a.mixedAt)[0]
}

/** Whether a coat is laid from this very mix: of the same coats, and for the same pieces where it sets. */
function isFrom(mix: MixStep, lay: LayStep): boolean {
  return mix.coats.some(coat => coat.id === lay.coat.id) && mix.only?.[0] === lay.only?.[0]
}
