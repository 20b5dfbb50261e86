import { eq, max } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { revisionInWorkshop, schemeInWorkshop } from '#server/services/scheme/scheme-in-workshop'
import { runs, workshops } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { RunListItem, RunStart } from '#shared/bench/run-view'
import { runInWorkshop } from './run-in-workshop'
import { runListItem } from './run-view'

/** Starts a run of so many pieces from a published revision, under the workshop's next number. */
export async function startRun(ctx: Ctx, { schemeId, revision: number, pieces }: RunStart): Promise<RunListItem> {
  assertMay(ctx, 'run:record')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    if (scheme.headNumber === 0) throw new Problem({ code: 'scheme/never-published' })
    const revision = await revisionInWorkshop(tx, schemeId, number)
    const [run] = await tx.db.insert(runs)
      .values({ workshopId: tx.workshopId, number: await nextNumber(tx), schemeId, revisionId: revision.id, pieces, startedBy: tx.personId })
      .returning({ id: runs.id })
    return runListItem(await runInWorkshop(tx, run!.id), [], Date.now())
  })
}

/** The workshop is held until the transaction ends, so that runs started at once are numbered one after another, without a gap. */
async function nextNumber(tx: Ctx): Promise<number> {
  await tx.db.select({ id: workshops.id }).from(workshops).where(eq(workshops.id, tx.workshopId)).for('no key update')
  const [last] = await tx.db.select({ number: max(runs.number) }).from(runs).where(eq(runs.workshopId, tx.workshopId))
  return (last?.number ?? 0) + 1
}
