import type { RunAct, RunEvent } from './run-event'
import type { RunStep } from './run-step'

/** What is known of a run at one moment. */
export interface RunState {
  /** Steps done once for all pieces, with when. */
  done: ReadonlyMap<string, { eventId: string, at: string }>
  /** Passes laid, by coat and piece. */
  laid: ReadonlyMap<string, ReadonlyMap<number, number>>
  /** When a wait began, by step. */
  waits: ReadonlyMap<string, string>
  /** Pieces set aside, with the reason. */
  aside: ReadonlyMap<number, string>
  inspected: ReadonlyMap<number, { passed: boolean, note: string }>
  deviations: readonly { eventId: string, stepId: string, what: string, note: string, at: string }[]
  finishedAt: string | null
}

/** What a run is made of, as far as its acts can be checked against it. */
export interface RunPlan { steps: readonly RunStep[], pieces: number }

/** Why an act cannot belong to this run, or null when it can. Only its own words are checked, never the order of arrival. */
export function refusalOf(plan: RunPlan, act: RunAct): string | null {
  switch (act.kind) {
    case 'pass-laid':
      if (!plan.steps.some(step => step.id === `lay:${act.coatId}`)) return 'This revision has no such coat.'
      return pieceRefusal(plan, act.piece)
    case 'step-done':
    case 'wait-started':
    case 'deviation':
      return plan.steps.some(step => step.id === act.stepId) ? null : 'This revision has no such step.'
    case 'piece-set-aside':
    case 'piece-taken-up':
    case 'inspected':
      return pieceRefusal(plan, act.piece)
    case 'run-finished':
    case 'taken-back':
      return null
  }
}

function pieceRefusal(plan: RunPlan, piece: number): string | null {
  return piece <= plan.pieces ? null : `This run has ${plan.pieces} pieces.`
}

/** Works out where a run stands from its acts, in the order they arrived. The same acts twice count once. */
export function runState(events: readonly RunEvent[]): RunState {
  const back = new Set(events.flatMap(({ act }) => act.kind === 'taken-back' ? [act.eventId] : []))
  const seen = new Set<string>()
  const done = new Map<string, { eventId: string, at: string }>()
  const laid = new Map<string, Map<number, number>>()
  const waits = new Map<string, string>()
  const aside = new Map<number, string>()
  const inspected = new Map<number, { passed: boolean, note: string }>()
  const deviations: { eventId: string, stepId: string, what: string, note: string, at: string }[] = []
  let finishedAt: string | null = null

  for (const { id, act, doneAt } of events) {
    if (back.has(id) || seen.has(id)) continue
    seen.add(id)
    switch (act.kind) {
      case 'pass-laid': {
        const pieces = laid.get(act.coatId) ?? new Map<number, number>()
        laid.set(act.coatId, pieces.set(act.piece, (pieces.get(act.piece) ?? 0) + act.passes))
        break
      }
      case 'step-done':
        done.set(act.stepId, { eventId: id, at: doneAt })
        break
      case 'wait-started':
        waits.set(act.stepId, doneAt)
        break
      case 'deviation':
        deviations.push({ eventId: id, stepId: act.stepId, what: act.what, note: act.note, at: doneAt })
        break
      case 'piece-set-aside':
        aside.set(act.piece, act.reason)
        break
      case 'piece-taken-up':
        aside.delete(act.piece)
        break
      case 'inspected':
        inspected.set(act.piece, { passed: act.passed, note: act.note })
        break
      case 'run-finished':
        finishedAt = doneAt
        break
      case 'taken-back':
        break
    }
  }
  return { done, laid, waits, aside, inspected, deviations, finishedAt }
}

/** Pieces that go on: all but those set aside. */
export function piecesGoingOn(plan: Pick<RunPlan, 'pieces'>, state: Pick<RunState, 'aside'>): number[] {
  return Array.from({ length: plan.pieces }, (_, i) => i + 1).filter(piece => !state.aside.has(piece))
}

/** Whether a step is done: ticked, or for a coat laid with all its passes on every piece that goes on, or for inspection every piece looked at. */
export function isStepDone(step: RunStep, plan: RunPlan, state: RunState): boolean {
  if (state.done.has(step.id)) return true
  const pieces = piecesGoingOn(plan, state)
  if (step.kind === 'lay') return pieces.length > 0 && pieces.every(piece => (state.laid.get(step.coat.id)?.get(piece) ?? 0) >= step.coat.passes)
  if (step.kind === 'inspect') return pieces.every(piece => state.inspected.has(piece))
  return false
}

/** The step to do now: the first that is not done; undefined when all are. */
export function currentStep(plan: RunPlan, state: RunState): RunStep | undefined {
  return plan.steps.find(step => !isStepDone(step, plan, state))
}
