import { and, desc, eq, isNotNull, isNull, lt } from 'drizzle-orm'
import { z } from 'zod'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { persons, revisions, runs, schemes } from '#server/db/tables'
import type { RunListItem, RunQuery } from '#shared/bench/run-view'
import { eventsOfRuns } from './run-events'
import { RUN_COLUMNS } from './run-in-workshop'
import { runListItem } from './run-view'

/** Where a page of runs starts: the number of the last one before it. */
export const RunsAfter = z.tuple([z.number().int()])
export type RunsAfter = z.output<typeof RunsAfter>

/** The sort key of a run in the list. */
export function runKey(run: Pick<RunListItem, 'number'>): RunsAfter {
  return [run.number]
}

/** Runs that are on the bench or were made, the newest first, one more than asked for when there are more. */
export async function listRuns(ctx: Ctx, query: RunQuery, after: RunsAfter | null): Promise<RunListItem[]> {
  assertMay(ctx, 'run:read')
  return inTransaction(ctx, async (tx) => {
    const rows = await tx.db.select(RUN_COLUMNS).from(runs)
      .innerJoin(schemes, eq(schemes.id, runs.schemeId))
      .innerJoin(revisions, eq(revisions.id, runs.revisionId))
      .leftJoin(persons, eq(persons.id, runs.startedBy))
      .where(and(
        eq(runs.workshopId, tx.workshopId),
        query.state === 'bench' ? isNull(runs.finishedAt) : isNotNull(runs.finishedAt),
        query.schemeId ? eq(runs.schemeId, query.schemeId) : undefined,
        after ? lt(runs.number, after[0]) : undefined,
      ))
      .orderBy(desc(runs.number)).limit(query.limit + 1)
    const events = await eventsOfRuns(tx, rows.map(row => row.run.id))
    const now = Date.now()
    return rows.map(row => runListItem(row, events.get(row.run.id) ?? [], now))
  })
}
