import type { SchemeBody } from './body'

export const HISTORY_MAX = 100
/** Edits of one field that follow each other faster than this are one step, ms. */
export const ONE_STEP_MS = 1000

interface Step { body: SchemeBody, words: string }

/** The bodies one can go back to and forward to. */
export interface History {
  /** Oldest first; `words` say what was done next. */
  past: readonly Step[]
  present: SchemeBody
  /** Nearest first; `words` say what would be done again. */
  future: readonly Step[]
  /** The field the last edit worked on, and when, so that a dragged slider is one step. */
  last: { field: string, at: number } | null
}

/** A history that starts with a body: nothing to undo. */
export function startHistory(body: SchemeBody): History {
  return { past: [], present: body, future: [], last: null }
}

/** Adds what an edit made. Quick repeated edits of one field become one step; at most 100 steps are kept. */
export function record(history: History, body: SchemeBody, step: { words: string, field: string | null, at: number }): History {
  const last = step.field === null ? null : { field: step.field, at: step.at }
  const goesOn = step.field !== null && history.last?.field === step.field && step.at - history.last.at <= ONE_STEP_MS && history.past.length > 0
  if (goesOn) return { past: history.past, present: body, future: [], last }
  return { past: [...history.past, { body: history.present, words: step.words }].slice(-HISTORY_MAX), present: body, future: [], last }
}

/** One step back; the same history when there is none. */
export function undo(history: History): History {
  const step = history.past.at(-1)
  if (!step) return history
  return { past: history.past.slice(0, -1), present: step.body, future: [{ body: history.present, words: step.words }, ...history.future], last: null }
}

/** One step forward again; the same history when there is none. */
export function redo(history: History): History {
  const [step, ...rest] = history.future
  if (!step) return history
  return { past: [...history.past, { body: history.present, words: step.words }], present: step.body, future: rest, last: null }
}
