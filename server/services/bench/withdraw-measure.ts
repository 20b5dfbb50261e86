import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { runMeasures, runMeasuresWithdrawn } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { RunMeasureView } from '#shared/bench/run-measure'
import { may } from '#shared/people/may'
import { runInWorkshop } from './run-in-workshop'
import { runMeasuresOf } from './run-measures'

/**
 * Withdraws a measure that was wrong: it is kept to be read and held against nothing any more. One's own for whoever is at the
 * bench; a colleague's, or the sample, for those who may change the scheme. Withdrawn twice is withdrawn once.
 */
export async function withdrawMeasure(ctx: Ctx, runId: string, measureId: string): Promise<RunMeasureView> {
  assertMay(ctx, 'run:record')
  return inTransaction(ctx, async (tx) => {
    const row = await runInWorkshop(tx, runId)
    const [measure] = await tx.db.select({ by: runMeasures.measuredBy, isSample: runMeasures.isSample }).from(runMeasures)
      .where(and(eq(runMeasures.id, measureId), eq(runMeasures.runId, runId), eq(runMeasures.workshopId, tx.workshopId)))
    if (!measure) throw new Problem({ code: 'run/not-found' })
    if ((measure.isSample || measure.by !== tx.personId) && !may(tx.role, 'scheme:change')) throw new Problem({ code: 'auth/not-allowed', action: 'scheme:change' })
    await tx.db.insert(runMeasuresWithdrawn).values({ measureId, workshopId: tx.workshopId, withdrawnBy: tx.personId }).onConflictDoNothing()
    const views = await runMeasuresOf(tx, row)
    return views.find(view => view.id === measureId)!
  })
}
