import { nextDoing } from './bench-order'
import { isFor } from './run-step'
import { type Part, partsOf, waitLeft } from './run-parts'
import { isThrough, piecesGoingOn, type RunPlan, type RunState } from './run-state'

/**
 * What to work on now, in the order that wastes least waiting (see `bench-order.ts`): pieces that stand at a step, or what is
 * done for all of them at once while they rest. Pieces whose rest is over are shown at their rest, to go on from there. When
 * there is nothing but to wait, the pieces whose wait ends first; undefined when every piece is through or set aside.
 * `now` is the clock, ms.
 */
export function workNow(plan: RunPlan, state: RunState, now: number): Part | undefined {
  const parts = partsOf(plan, state).filter(part => part.step !== undefined)
  const doing = nextDoing(plan, { state, now })
  const { step, piece } = doing ?? {}
  if (step && piece === null) return onceFor(plan, state, step.id)
  if (piece) return parts.find(part => part.pieces.includes(piece))
  // Nothing is left for the hands: what is left dries by itself.
  const left = (part: Part) => Math.min(...part.pieces.map(each => part.step ? waitLeft(part.step, each, state, now) : 0))
  return parts.sort((a, b) => left(a) - left(b))[0]
}

/** A step as it is done once for every piece it is still open for; undefined when it is open for none. */
export function onceFor(plan: RunPlan, state: RunState, stepId: string): Part | undefined {
  const index = plan.steps.findIndex(step => step.id === stepId)
  const step = plan.steps[index]
  const pieces = step ? piecesGoingOn(plan, state).filter(piece => isFor(step, piece) && !isThrough(step, piece, state)) : []
  if (pieces.length === 0) return undefined
  const isAhead = partsOf(plan, state).some(part => part.index < index && part.pieces.some(piece => pieces.includes(piece)))
  return { step, index, pieces, ...isAhead ? { isAhead } : {} }
}
