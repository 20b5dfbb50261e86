import { isFor, isWait, type RunStep, waitSeconds, type WaitStep } from './run-step'
import { isThrough, passesOn, piecesGoingOn, type RunPlan, type RunState, type Wait } from './run-state'

/** Pieces that stand at the same step and are worked on together. A batch is one part until some of it goes ahead. */
export interface Part {
  /** Where they stand; undefined when they are through with everything. */
  step: RunStep | undefined
  /** Place of the step in the plan, from 0; the number of steps when through. */
  index: number
  pieces: number[]
  /** It is done for all of them at once, before they stand there: while they rest. */
  isAhead?: true
}

/** The parts of a run, the one furthest behind first. Pieces set aside are in none and hold up nothing. */
export function partsOf(plan: RunPlan, state: RunState): Part[] {
  const parts = new Map<number, Part>()
  for (const piece of piecesGoingOn(plan, state)) {
    const found = plan.steps.findIndex(step => !isThrough(step, piece, state))
    const index = found < 0 ? plan.steps.length : found
    const part = parts.get(index) ?? { step: plan.steps[index], index, pieces: [] }
    part.pieces.push(piece)
    parts.set(index, part)
  }
  return [...parts.values()].sort((a, b) => a.index - b.index)
}

/** The wait of a step that counts for a piece: the last one started by hand, else the first that began by itself; undefined when none did. */
export function waitOf(stepId: string, piece: number, state: Pick<RunState, 'waits'>): Wait | undefined {
  const begun = state.waits.filter(wait => wait.stepId === stepId && (wait.pieces === null || wait.pieces.includes(piece)))
  return begun.findLast(wait => wait.byHand) ?? begun[0]
}

/** How long a wait takes for a piece, ms: as its step says, or as it was set since. */
export function wholeWait(step: WaitStep, piece: number, state: Pick<RunState, 'waitSets'>): number {
  const set = state.waitSets.findLast(each => each.stepId === step.id && (each.pieces === null || each.pieces.includes(piece)))
  return (set?.seconds ?? waitSeconds(step)) * 1000
}

/** Milliseconds a piece still has to wait at a step; 0 when it need not, all of it when the wait has not begun. `now` is the clock, ms. */
export function waitLeft(step: RunStep, piece: number, state: Pick<RunState, 'waits' | 'waitSets'>, now: number): number {
  if (!isWait(step)) return 0
  const whole = wholeWait(step, piece, state)
  const wait = waitOf(step.id, piece, state)
  return wait ? Math.min(whole, Math.max(0, Date.parse(wait.at) + whole - now)) : whole
}

/** Whether a piece has had what its step asks: all its passes, its rest, a look at it. `now` is the clock, ms. */
export function isReady(step: RunStep, piece: number, state: RunState, now: number): boolean {
  switch (step.kind) {
    case 'lay': return passesOn(step.coat.id, piece, state) >= step.coat.passes
    case 'rest':
    case 'cure':
    case 'turn': return waitLeft(step, piece, state, now) === 0
    case 'inspect': return state.inspected.has(piece)
    case 'prepare':
    case 'warm':
    case 'mix':
    case 'set':
    case 'test':
    case 'look-over':
    case 'fit':
    case 'heat':
    case 'lift':
    case 'clean':
    case 'eyes': return true
  }
}

/** The step after this one for a part: the first later one that is for any of its pieces and not behind it. */
export function stepAfter(plan: RunPlan, state: RunState, part: Part): RunStep | undefined {
  return plan.steps.slice(part.index + 1).find(step => part.pieces.some(piece => isFor(step, piece) && !isThrough(step, piece, state)))
}
