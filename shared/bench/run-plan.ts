import type { RunPlan } from './run-state'
import { runSteps } from './run-steps'
import type { RunView } from './run-view'

/** What a run is made of, worked out from what it began with: the one way to its steps, on every tablet and on the server. */
export function runPlan(run: Pick<RunView, 'body' | 'materials' | 'pieces' | 'stepsForm' | 'madeOf'>): RunPlan {
  const { body, materials, pieces, stepsForm, madeOf } = run
  return { steps: runSteps({ body, materials }, pieces, { form: stepsForm, madeOf }), pieces }
}
