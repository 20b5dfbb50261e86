import { problemOf } from './problem-of'
import { sentence } from './sentence'

const NO_CONNECTION = 'There is no connection to the workshop. Nothing was lost; try again when it is back.'
const OUR_SIDE = 'Something on our side went wrong. What was saved is safe; try again.'

/** Any error as one sentence to read: what happened, and what can be done. */
export function explain(error: unknown): string {
  const problem = problemOf(error)
  if (problem) return sentence(problem)
  return hasStatus(error) ? OUR_SIDE : NO_CONNECTION
}

/** Whether somebody answered at all. */
function hasStatus(error: unknown): boolean {
  if (typeof error !== 'object' || error === null) return true
  if ('statusCode' in error && typeof error.statusCode === 'number') return true
  return !(error instanceof Error && (error.name === 'FetchError' || error instanceof TypeError))
}
