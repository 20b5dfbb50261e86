import { and, asc, desc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { schemeInWorkshop } from '#server/services/scheme/scheme-in-workshop'
import { bottles, bottleUses, paints, persons, revisions, runs, schemes } from '#server/db/tables'
import type { LotUsed, RunReport, RunYield } from '#shared/bench/run-report'
import { runState } from '#shared/bench/run-state'
import { benchMinutes } from '#shared/bench/step-times'
import { may } from '#shared/people/may'
import { eventsOfRuns } from './run-events'
import { RUN_COLUMNS, runInWorkshop } from './run-in-workshop'
import { runMeasuresOf, sampleOf } from './run-measures'

/** Runs of a scheme whose yield is told, the newest. */
const YIELDS_MAX = 40

/** What the shelf, the photos and the other runs of the scheme say of a run. */
export async function getReport(ctx: Ctx, runId: string): Promise<RunReport> {
  assertMay(ctx, 'run:read')
  return inTransaction(ctx, async (tx) => {
    const row = await runInWorkshop(tx, runId)
    return {
      lots: await lotsOf(tx, runId, row.materials.paints),
      measures: await runMeasuresOf(tx, row),
      sample: (await sampleOf(tx, row.run.schemeId))?.record ?? null,
      yields: await yieldsOf(tx, row.run.schemeId),
      draftVersion: may(tx.role, 'scheme:change') ? (await schemeInWorkshop(tx, row.run.schemeId)).version : null,
    }
  })
}

async function lotsOf(tx: Ctx, runId: string, frozen: readonly { id: string, name: string }[]): Promise<LotUsed[]> {
  const rows = await tx.db.select({ paintId: bottleUses.paintId, ml: bottleUses.ml, bottleId: bottles.id, code: bottles.code, lot: bottles.lot, name: paints.name })
    .from(bottleUses).leftJoin(bottles, eq(bottles.id, bottleUses.bottleId)).leftJoin(paints, eq(paints.id, bottleUses.paintId))
    .where(and(eq(bottleUses.runId, runId), eq(bottleUses.workshopId, tx.workshopId))).orderBy(asc(paints.name), asc(bottles.code))
  return rows.map(({ paintId, ml, bottleId, code, lot, name }) => ({
    // As the run knew it; what stood in for another by its name today.
    paintId, paintName: frozen.find(paint => paint.id === paintId)?.name ?? name ?? 'a paint', ml,
    bottle: bottleId !== null && code !== null && lot !== null ? { id: bottleId, code, lot } : null,
  }))
}

async function yieldsOf(tx: Ctx, schemeId: string): Promise<RunYield[]> {
  const rows = await tx.db.select(RUN_COLUMNS).from(runs)
    .innerJoin(schemes, eq(schemes.id, runs.schemeId)).innerJoin(revisions, eq(revisions.id, runs.revisionId)).leftJoin(persons, eq(persons.id, runs.startedBy))
    .where(and(eq(runs.schemeId, schemeId), eq(runs.workshopId, tx.workshopId))).orderBy(desc(runs.number)).limit(YIELDS_MAX)
  const events = await eventsOfRuns(tx, rows.map(row => row.run.id))
  return rows.map(({ run, revision }) => {
    const own = events.get(run.id) ?? []
    const state = runState(own)
    const looks = [...state.inspected].filter(([piece]) => !state.aside.has(piece))
    return {
      runId: run.id, number: run.number, revision, finishedAt: run.finishedAt?.toISOString() ?? null, pieces: run.pieces,
      passed: looks.filter(([, look]) => look.passed).length, failed: looks.filter(([, look]) => !look.passed).length,
      setAside: state.aside.size, benchMinutes: benchMinutes(own),
    }
  })
}
