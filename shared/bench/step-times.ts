import type { RunStep } from './run-step'
import { type DoneAct, isThrough, type RunPlan, standingActs, timeOf } from './run-state'

/** Longer than this between two acts, ms, and nobody was at the bench. A planning value (common practice). */
const AWAY_AFTER_MS = 15 * 60_000

const inTime = (a: DoneAct, b: DoneAct) => Date.parse(timeOf(a)) - Date.parse(timeOf(b))

/** Time somebody was at the bench, minutes: from act to act, a long pause counted as if they had gone after a quarter of an hour. */
export function benchMinutes(events: readonly DoneAct[]): number {
  const times = standingActs(events).sort(inTime).map(event => Date.parse(timeOf(event)))
  return times.slice(1).reduce((sum, time, i) => sum + Math.min(time - times[i]!, AWAY_AFTER_MS), 0) / 60_000
}

/** When a step was gone through, and how long it took a piece. */
export interface StepTime {
  step: RunStep
  /** When the first and the last piece were through, ISO times. */
  firstAt: string
  lastAt: string
  /** Pieces that are through. */
  pieces: number
  /** Middle of how long a piece stood at the step, minutes: from when it was through with the one before. */
  minutes: number
  /** Who went through it, by name. */
  by: string[]
}

/** A doing, and by whom. */
export type DoneBy = DoneAct & { by?: { name: string } | null }

/** When each step was done, by whom, and how long it took, in the order of the steps; those nobody is through with are left out. */
export function stepTimes(plan: RunPlan, events: readonly DoneBy[], startedAt: string): StepTime[] {
  const all = Array.from({ length: plan.pieces }, (_, n) => n + 1)
  const doings = standingActs(events).sort(inTime).flatMap(event => event.act.kind === 'step-done'
    ? [{ stepId: event.act.stepId, pieces: event.act.pieces ?? all, at: Date.parse(timeOf(event)), name: event.by?.name }]
    : [])
  /** When each piece was through with the step before the one that is looked at, ms. */
  const before = new Map(all.map(piece => [piece, Date.parse(startedAt)]))
  return plan.steps.flatMap((step): StepTime[] => {
    const own = doings.filter(doing => doing.stepId === step.id)
    const left = new Map<number, number>()
    for (const { pieces, at } of own) for (const piece of pieces) if (!left.has(piece) && isForPiece(step, piece)) left.set(piece, at)
    if (left.size === 0) return []
    const took = [...left].map(([piece, at]) => Math.max(0, at - before.get(piece)!)).sort((a, b) => a - b)
    for (const [piece, at] of left) before.set(piece, Math.max(at, before.get(piece)!))
    const times = [...left.values()]
    return [{
      step, firstAt: new Date(Math.min(...times)).toISOString(), lastAt: new Date(Math.max(...times)).toISOString(), pieces: left.size,
      minutes: took[Math.floor((took.length - 1) / 2)]! / 60_000,
      by: [...new Set(own.flatMap(({ name }) => name ?? []))],
    }]
  })
}

function isForPiece(step: RunStep, piece: number): boolean {
  return !isThrough(step, piece, { done: new Map() })
}
