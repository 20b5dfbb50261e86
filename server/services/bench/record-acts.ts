import { and, asc, eq, inArray, sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { bottles, paints, runEvents, runs } from '#server/db/tables'
import type { RunAct, RunEvent, RunEventAnswer } from '#shared/bench/run-event'
import type { RunEventView } from '#shared/bench/run-view'
import { refusalOf, runState } from '#shared/bench/run-state'
import { sameValue } from '#shared/scheme/canonical'
import { RUN_CHANNEL, runNews } from './run-news'
import { eventsOfRun } from './run-events'
import { holdRun, planOfRow, runInWorkshop } from './run-in-workshop'
import { settleStock } from './settle-stock'

/** A tablet's clock that differs by less, ms, is right: the way to the server takes time too. */
const CLOCK_IS_RIGHT_MS = 5_000

/**
 * Notes what a tablet did, in the order it did it, with an answer for each act. An act sent again is taken again and counts
 * once; what cannot belong to this run is refused with the reason; what comes late, even after the finish, is still noted.
 * Whether the run is finished, and what it took from the shelf, follow from all its acts, in the same transaction.
 * `clockBehind` is how much the tablet's clock was behind the server's when it sent them, ms.
 */
export async function recordActs(ctx: Ctx, runId: string, events: readonly RunEvent[], clockBehind = 0): Promise<RunEventAnswer[]> {
  assertMay(ctx, 'run:record')
  return inTransaction(ctx, async (tx) => {
    // Held before the first act is written: whoever reads by `since` then never passes over an act that arrived earlier.
    await holdRun(tx, runId)
    const row = await runInWorkshop(tx, runId)
    const plan = planOfRow(row)
    const isThere = await shelfOf(tx, events)
    const refused = new Map(events.flatMap(event => reasonFor(refusalOf(plan, event.act) ?? isThere(event.act), event.id)))
    const wanted = events.filter(event => !refused.has(event.id))
    const isNews = await insert(tx, runId, wanted, Math.abs(clockBehind) < CLOCK_IS_RIGHT_MS ? 0 : clockBehind)
    for (const [id, reason] of await strangers(tx, runId, wanted)) refused.set(id, reason)
    if (isNews) {
      const all = await eventsOfRun(tx, runId)
      await noteFinish(tx, runId, all)
      await settleStock(tx, row, plan, all)
      await tx.db.execute(sql`select pg_notify(${RUN_CHANNEL}, ${runNews(runId, all.at(-1)?.seq ?? 0)})`)
    }
    return events.map(({ id }): RunEventAnswer => {
      const reason = refused.get(id)
      return reason === undefined ? { id, taken: true } : { id, taken: false, reason }
    })
  })
}

function reasonFor(reason: string | null, id: string): [string, string][] {
  return reason === null ? [] : [[id, reason]]
}

/** Looks up what acts name on the shelf; answers with why one cannot be, or null. Nothing on the shelf is ever removed, so that no order of arrival changes the answer. */
async function shelfOf(tx: Ctx, events: readonly RunEvent[]): Promise<(act: RunAct) => string | null> {
  const bottleIds = events.flatMap(({ act }) => act.kind === 'bottle-used' ? [act.bottleId] : [])
  const paintIds = events.flatMap(({ act }) => act.kind === 'paint-changed' ? [act.to] : [])
  const held = bottleIds.length === 0
    ? []
    : await tx.db.select({ id: bottles.id, paintId: bottles.paintId }).from(bottles)
        .where(and(eq(bottles.workshopId, tx.workshopId), inArray(bottles.id, bottleIds)))
  const known = paintIds.length === 0
    ? []
    : await tx.db.select({ id: paints.id }).from(paints)
        .where(and(eq(paints.workshopId, tx.workshopId), inArray(paints.id, paintIds)))
  return (act) => {
    if (act.kind === 'bottle-used' && !held.some(bottle => bottle.id === act.bottleId && bottle.paintId === act.paintId)) return 'The shelf has no such bottle of this paint.'
    if (act.kind === 'paint-changed' && !known.some(paint => paint.id === act.to)) return 'The shelf has no such paint.'
    return null
  }
}

/** Writes acts that are not there yet; answers whether there were any. */
async function insert(tx: Ctx, runId: string, events: readonly RunEvent[], clockBehind: number): Promise<boolean> {
  if (events.length === 0) return false
  const written = await tx.db.insert(runEvents).values(events.map(({ id, doneAt, place, act }) => ({
    id, workshopId: tx.workshopId, runId, kind: act.kind, body: act, personId: tx.personId, doneAt: new Date(doneAt), place, clockBehind,
  }))).onConflictDoNothing().returning({ id: runEvents.id })
  return written.length > 0
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

async function noteFinish(tx: Ctx, runId: string, events: readonly RunEventView[]): Promise<void> {
  const { finishedAt } = runState(events)
  await tx.db.update(runs).set({ finishedAt: finishedAt === null ? null : new Date(finishedAt) }).where(and(eq(runs.id, runId), eq(runs.workshopId, tx.workshopId)))
}
