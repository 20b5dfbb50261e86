import { newId } from './new-id'
import { nextPlace, RunAct, type RunEvent } from '#shared/bench/run-event'

/**
 * Acts done together at one moment, ms, each with an id and a place of its own after everything known so far. They are plain
 * copies: what a page watches cannot be kept.
 * @throws {ZodError} on what is no act
 */
export function newActs(acts: readonly RunAct[], known: readonly RunEvent[], now: number): RunEvent[] {
  const first = nextPlace(known)
  return acts.map((act, n) => ({ id: newId(), doneAt: new Date(now).toISOString(), place: first + n, act: RunAct.parse(act) }))
}
