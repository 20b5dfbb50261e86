import { and, desc, eq, isNull } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import type { Ctx } from '#server/services/ctx'
import { persons, runMeasures, runMeasuresWithdrawn, runs } from '#server/db/tables'
import { judgeZones } from '#shared/bench/judge-zones'
import type { RunMeasureView, SampleRecord, ZoneMeasure } from '#shared/bench/run-measure'
import type { RunWithFinish } from './run-in-workshop'

const withdrawers = alias(persons, 'withdrawers')
const personOf = (id: string | null, name: string | null) => id !== null && name !== null ? { id, name } : null

/** Every measure of a run, the newest first, each held against what was promised and against the scheme's sample; those withdrawn too. */
export async function runMeasuresOf(tx: Ctx, { run }: Pick<RunWithFinish, 'run'>): Promise<RunMeasureView[]> {
  const rows = await tx.db.select({ measure: runMeasures, byName: persons.name, withdrawn: runMeasuresWithdrawn, withdrawerName: withdrawers.name }).from(runMeasures)
    .leftJoin(persons, eq(persons.id, runMeasures.measuredBy))
    .leftJoin(runMeasuresWithdrawn, eq(runMeasuresWithdrawn.measureId, runMeasures.id))
    .leftJoin(withdrawers, eq(withdrawers.id, runMeasuresWithdrawn.withdrawnBy))
    .where(and(eq(runMeasures.runId, run.id), eq(runMeasures.workshopId, tx.workshopId))).orderBy(desc(runMeasures.measuredAt), desc(runMeasures.id))
  const sample = await sampleOf(tx, run.schemeId)
  return rows.map(({ measure, byName, withdrawn, withdrawerName }): RunMeasureView => ({
    id: measure.id, piece: measure.piece, photoId: measure.photoId, note: measure.note, isSample: measure.isSample,
    zones: judgeZones(measure.zones, sample && sample.record.measureId !== measure.id ? sample.zones : []),
    by: personOf(measure.measuredBy, byName),
    at: measure.measuredAt.toISOString(),
    withdrawn: withdrawn && { by: personOf(withdrawn.withdrawnBy, withdrawerName), at: withdrawn.withdrawnAt.toISOString() },
  }))
}

/** The sample of a scheme: the piece marked last that was not withdrawn, with its colours; undefined while there is none. */
export async function sampleOf(tx: Ctx, schemeId: string): Promise<{ record: SampleRecord, zones: ZoneMeasure[] } | undefined> {
  const [found] = await tx.db.select({ measure: runMeasures, number: runs.number, byName: persons.name }).from(runMeasures)
    .innerJoin(runs, eq(runs.id, runMeasures.runId))
    .leftJoin(persons, eq(persons.id, runMeasures.measuredBy))
    .leftJoin(runMeasuresWithdrawn, eq(runMeasuresWithdrawn.measureId, runMeasures.id))
    .where(and(eq(runs.schemeId, schemeId), eq(runMeasures.workshopId, tx.workshopId), eq(runMeasures.isSample, true), isNull(runMeasuresWithdrawn.measureId)))
    .orderBy(desc(runMeasures.measuredAt), desc(runMeasures.id)).limit(1)
  if (!found) return undefined
  const { measure, number, byName } = found
  return {
    record: { measureId: measure.id, run: { id: measure.runId, number }, piece: measure.piece, photoId: measure.photoId, by: personOf(measure.measuredBy, byName), at: measure.measuredAt.toISOString() },
    zones: measure.zones,
  }
}
