import type { RunEvent } from '#shared/bench/run-event'
import type { RunState } from '#shared/bench/run-state'

/** Where a run stands, as plain words: without times, which clocks may have wrong, and without what only names acts. */
export interface Standing {
  passes: Record<string, number>
  through: Record<string, true>
  aside: Record<number, string>
  inspected: Record<number, boolean>
  reducer: Record<string, number>
  waits: Record<string, number>
  isFinished: boolean
}

/**
 * The bookkeeper that everything is held against: somebody with a pencil who was there, writes down each act once in the
 * order in which things were done, and strikes out what was taken back. No care for ids, sets or places.
 */
export function inOrderOnce(done: readonly RunEvent[], pieces: number): Standing {
  const book: Standing = { passes: {}, through: {}, aside: {}, inspected: {}, reducer: {}, waits: {}, isFinished: false }
  const struck = done.flatMap(({ act }) => act.kind === 'taken-back' ? [act.eventId] : [])
  const all = Array.from({ length: pieces }, (_, n) => n + 1)
  for (const { id, act } of done) {
    if (struck.includes(id)) continue
    if (act.kind === 'pass-laid') for (const piece of act.pieces) book.passes[`${act.coatId} ${piece}`] = (book.passes[`${act.coatId} ${piece}`] ?? 0) + act.passes
    if (act.kind === 'step-done') for (const piece of act.pieces ?? all) book.through[`${act.stepId} ${piece}`] = true
    if (act.kind === 'piece-set-aside') book.aside[act.piece] = act.reason
    if (act.kind === 'piece-taken-up') book.aside = Object.fromEntries(Object.entries(book.aside).filter(([piece]) => Number(piece) !== act.piece))
    if (act.kind === 'inspected') for (const piece of act.pieces) book.inspected[piece] = act.passed
    if (act.kind === 'thinned') book.reducer[act.coatId] = act.reducer
    if (act.kind === 'wait-set') book.waits[act.stepId] = act.seconds
    if (act.kind === 'run-finished') book.isFinished = true
  }
  return book
}

/** The same plain words of a state. */
export function standingOf(state: RunState, pieces: number): Standing {
  const all = Array.from({ length: pieces }, (_, n) => n + 1)
  const standing: Standing = { passes: {}, through: {}, aside: Object.fromEntries(state.aside), inspected: {}, reducer: {}, waits: {}, isFinished: state.finishedAt !== null }
  for (const [coatId, laid] of state.laid) for (const [piece, count] of laid) standing.passes[`${coatId} ${piece}`] = count
  for (const [stepId, done] of state.done) for (const piece of done.pieces === 'all' ? all : done.pieces) standing.through[`${stepId} ${piece}`] = true
  for (const [piece, look] of state.inspected) standing.inspected[piece] = look.passed
  for (const change of state.cupChanges) if (change.how === 'thinned') standing.reducer[change.coatId] = change.reducer
  for (const set of state.waitSets) standing.waits[set.stepId] = set.seconds
  return standing
}
