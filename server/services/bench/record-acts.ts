import { and, asc, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { runEvents, runs } from '#server/db/tables'
import type { RunEvent, RunEventAnswer } from '#shared/bench/run-event'
import { refusalOf, runState } from '#shared/bench/run-state'
import { runSteps } from '#shared/bench/run-steps'
import { sameValue } from '#shared/scheme/canonical'
import { eventsOfRun } from './run-events'
import { holdRun, runInWorkshop } from './run-in-workshop'

/**
 * Notes what a tablet did, in the order it did it, with an answer for each act. An act sent again is taken again and counts
 * once; what cannot belong to this run is refused with the reason; what comes late, even after the finish, is still noted.
 * Whether the run is finished follows from all its acts, in the same transaction.
 */
export async function recordActs(ctx: Ctx, runId: string, events: readonly RunEvent[]): Promise<RunEventAnswer[]> {
  assertMay(ctx, 'run:record')
  return inTransaction(ctx, async (tx) => {
    // Held before the first act is written: whoever reads by `since` then never passes over an act that arrived earlier.
    await holdRun(tx, runId)
    const { run, body, materials } = await runInWorkshop(tx, runId)
    const plan = { steps: runSteps({ body, materials }, run.pieces), pieces: run.pieces }
    const refused = new Map(events.flatMap(event => reasonFor(refusalOf(plan, event.act), event.id)))
    const wanted = events.filter(event => !refused.has(event.id))
    await insert(tx, runId, wanted)
    for (const [id, reason] of await strangers(tx, runId, wanted)) refused.set(id, reason)
    await noteFinish(tx, runId)
    return events.map(({ id }): RunEventAnswer => {
      const reason = refused.get(id)
      return reason === undefined ? { id, taken: true } : { id, taken: false, reason }
    })
  })
}

function reasonFor(reason: string | null, id: string): [string, string][] {
  return reason === null ? [] : [[id, reason]]
}

async function insert(tx: Ctx, runId: string, events: readonly RunEvent[]): Promise<void> {
  if (events.length === 0) return
  await tx.db.insert(runEvents).values(events.map(({ id, doneAt, act }) => ({
    id, workshopId: tx.workshopId, runId, kind: act.kind, body: act, personId: tx.personId, doneAt: new Date(doneAt),
  }))).onConflictDoNothing()
}

/** Acts whose id already stands for something else: in another run, or another act of this one. */
async function strangers(tx: Ctx, runId: string, events: readonly RunEvent[]): Promise<[id: string, reason: string][]> {
  if (events.length === 0) return []
  const held = await tx.db.select({ id: runEvents.id, body: runEvents.body }).from(runEvents)
    .where(and(eq(runEvents.workshopId, tx.workshopId), eq(runEvents.runId, runId), inArray(runEvents.id, events.map(event => event.id)))).orderBy(asc(runEvents.seq))
  const bodies = new Map(held.map(({ id, body }) => [id, body]))
  return events.filter(({ id, act }) => !bodies.has(id) || !sameValue(bodies.get(id), act))
    .map(({ id }) => [id, 'Its id already stands for another act.'])
}

async function noteFinish(tx: Ctx, runId: string): Promise<void> {
  const { finishedAt } = runState(await eventsOfRun(tx, runId))
  await tx.db.update(runs).set({ finishedAt: finishedAt === null ? null : new Date(finishedAt) }).where(and(eq(runs.id, runId), eq(runs.workshopId, tx.workshopId)))
}
