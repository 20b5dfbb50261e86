import { and, asc, eq, gt, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { persons, runEvents } from '#server/db/tables'
import { RunAct } from '#shared/bench/run-event'
import type { RunEventView } from '#shared/bench/run-view'

const COLUMNS = { event: runEvents, byName: persons.name }

interface EventRow { event: typeof runEvents.$inferSelect, byName: string | null }

/** Acts of a run in the order they arrived, from after one place in that order. */
export async function eventsOfRun(tx: Ctx, runId: string, since = 0): Promise<RunEventView[]> {
  const rows = await tx.db.select(COLUMNS).from(runEvents).leftJoin(persons, eq(persons.id, runEvents.personId))
    .where(and(eq(runEvents.workshopId, tx.workshopId), eq(runEvents.runId, runId), gt(runEvents.seq, since))).orderBy(asc(runEvents.seq))
  return rows.map(runEventView)
}

/** Acts of several runs, by run. */
export async function eventsOfRuns(tx: Ctx, runIds: readonly string[]): Promise<Map<string, RunEventView[]>> {
  const found = new Map(runIds.map(id => [id, [] as RunEventView[]]))
  if (runIds.length === 0) return found
  const rows = await tx.db.select(COLUMNS).from(runEvents).leftJoin(persons, eq(persons.id, runEvents.personId))
    .where(and(eq(runEvents.workshopId, tx.workshopId), inArray(runEvents.runId, [...runIds]))).orderBy(asc(runEvents.seq))
  for (const row of rows) found.get(row.event.runId)?.push(runEventView(row))
  return found
}

/** Row to wire. What was written was checked then; it is checked again, since forms of acts may be added. */
function runEventView({ event, byName }: EventRow): RunEventView {
  return {
    id: event.id,
    seq: event.seq,
    doneAt: event.doneAt.toISOString(),
    at: new Date(event.doneAt.getTime() + event.clockBehind).toISOString(),
    ...event.place === null ? {} : { place: event.place },
    act: RunAct.parse(event.body),
    by: event.personId !== null && byName !== null ? { id: event.personId, name: byName } : null,
  }
}
