import { api } from '~/composables/api/api'
import type { Setback } from '~/bench/act-keeper'
import { explain } from '~/errors/explain'
import { problemOf } from '~/errors/problem-of'
import type { RunEvent, RunEventAnswer } from '#shared/bench/run-event'
import { RunView, type RunEventsView } from '#shared/bench/run-view'

/** No answer within this time counts as no network: one who has gloves on does not wait, ms. */
const PATIENCE_MS = 8_000

/** Hands acts of one run over, with the time at the bench by which the server sees how wrong their clock is. */
export async function sendActs(runId: string, events: readonly RunEvent[], now: number): Promise<readonly RunEventAnswer[]> {
  const { answers } = await api('/api/runs/:runId/events', { params: { runId }, method: 'POST', body: { events, sentAt: new Date(now).toISOString() }, timeout: PATIENCE_MS, retry: 0 })
  return answers
}

/** What was done in a run since a place in the order of arrival. */
export async function fetchActs(runId: string, since: number): Promise<RunEventsView> {
  const view = await api('/api/runs/:runId/events', { params: { runId }, query: { since }, timeout: PATIENCE_MS, retry: 0 })
  return view
}

/** A whole run, as the server has it now. */
export async function fetchRun(runId: string): Promise<RunView> {
  return RunView.parse(await api('/api/runs/:runId', { params: { runId }, timeout: PATIENCE_MS, retry: 0 }))
}

/** Tells why a hand-over failed. */
export function setbackOf(error: unknown): Setback {
  const problem = problemOf(error)
  switch (problem?.code) {
    case undefined: return { kind: 'no network' }
    case 'auth/signed-out': return { kind: 'signed out', words: explain(error) }
    case 'input/invalid': return { kind: 'unreadable', words: `This act could not be read: ${explain(error)}` }
    default: return { kind: 'refusing', words: explain(error) }
  }
}
