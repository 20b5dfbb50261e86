import type { RunDay } from './run-day'
import { planOfRow, type RunWithFinish } from './run-in-workshop'
import { partsOf } from '#shared/bench/run-parts'
import { workNow } from '#shared/bench/work-now'
import { runState } from '#shared/bench/run-state'
import { stepName } from '#shared/bench/step-words'
import type { RunEventView, RunListItem, RunView } from '#shared/bench/run-view'

function runBase({ run, schemeName, revision, startedByName }: RunWithFinish) {
  return {
    id: run.id,
    number: run.number,
    scheme: { id: run.schemeId, name: schemeName },
    revision,
    pieces: run.pieces,
    names: run.names,
    startedAt: run.startedAt.toISOString(),
    startedBy: run.startedBy !== null && startedByName !== null ? { id: run.startedBy, name: startedByName } : null,
    finishedAt: run.finishedAt?.toISOString() ?? null,
  }
}

/** A run in a list, with where its acts have brought it. */
export function runListItem(row: RunWithFinish, events: readonly RunEventView[], now: number): RunListItem {
  const { run } = row
  const plan = planOfRow(row)
  const state = runState(events)
  const step = workNow(plan, state, now)?.step
  const looks = [...state.inspected].filter(([piece]) => !state.aside.has(piece))
  return {
    ...runBase(row),
    stands: step && run.finishedAt === null ? stepName(step) : null,
    stepsDone: partsOf(plan, state)[0]?.index ?? 0,
    steps: plan.steps.length,
    passed: looks.filter(([, look]) => look.passed).length,
    failed: looks.filter(([, look]) => !look.passed).length,
    setAside: state.aside.size,
  }
}

/** A run as the bench follows it, at a moment of the server's clock. */
export function runView(row: RunWithFinish, day: RunDay, events: RunEventView[], now: Date): RunView {
  return { ...runBase(row), body: row.body, materials: row.materials, headNumber: row.headNumber, room: row.run.room, madeOf: row.run.madeOf, stepsForm: row.run.stepsForm, ...day, events, now: now.toISOString() }
}
