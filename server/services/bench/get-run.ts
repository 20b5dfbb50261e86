import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { RunEventsView, RunView } from '#shared/bench/run-view'
import { eventsOfRun } from './run-events'
import { dayOf } from './run-day'
import { runInWorkshop } from './run-in-workshop'
import { runView } from './run-view'

/** Everything a tablet needs to follow a run by itself: the revision as it was frozen, whatever was published since, and every act. */
export async function getRun(ctx: Ctx, runId: string): Promise<RunView> {
  assertMay(ctx, 'run:read')
  return inTransaction(ctx, async (tx) => {
    const row = await runInWorkshop(tx, runId)
    return runView(row, await dayOf(tx, row), await eventsOfRun(tx, runId), new Date())
  })
}

/** What was done in a run since one place in the order of arrival, by whoever. */
export async function getRunEvents(ctx: Ctx, runId: string, since: number): Promise<RunEventsView> {
  assertMay(ctx, 'run:read')
  return inTransaction(ctx, async (tx) => {
    const { run, headNumber } = await runInWorkshop(tx, runId)
    return { events: await eventsOfRun(tx, runId, since), headNumber, finishedAt: run.finishedAt?.toISOString() ?? null, now: new Date().toISOString() }
  })
}
