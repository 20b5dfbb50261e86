import { and, desc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { persons, runMeasures, runs } from '#server/db/tables'
import { judgeZones } from '#shared/bench/judge-zones'
import type { RunMeasureView } from '#shared/bench/run-measure'
import type { RunWithFinish } from './run-in-workshop'

/** Every measure of a run, the newest first, each held against what was promised and against the scheme's newest sample. */
export async function runMeasuresOf(tx: Ctx, { run }: Pick<RunWithFinish, 'run'>): Promise<RunMeasureView[]> {
  const rows = await tx.db.select({ measure: runMeasures, byName: persons.name }).from(runMeasures)
    .leftJoin(persons, eq(persons.id, runMeasures.measuredBy))
    .where(and(eq(runMeasures.runId, run.id), eq(runMeasures.workshopId, tx.workshopId))).orderBy(desc(runMeasures.measuredAt), desc(runMeasures.id))
  const [sample] = await tx.db.select({ zones: runMeasures.zones, id: runMeasures.id }).from(runMeasures)
    .innerJoin(runs, eq(runs.id, runMeasures.runId))
    .where(and(eq(runs.schemeId, run.schemeId), eq(runMeasures.workshopId, tx.workshopId), eq(runMeasures.isSample, true)))
    .orderBy(desc(runMeasures.measuredAt)).limit(1)
  return rows.map(({ measure, byName }): RunMeasureView => ({
    id: measure.id, piece: measure.piece, photoId: measure.photoId, note: measure.note, isSample: measure.isSample,
    zones: judgeZones(measure.zones, sample && sample.id !== measure.id ? sample.zones : []),
    by: measure.measuredBy !== null && byName !== null ? { id: measure.measuredBy, name: byName } : null,
    at: measure.measuredAt.toISOString(),
  }))
}
