import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { persons, revisions, runs, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import { runPlan } from '#shared/bench/run-plan'
import type { RunPlan } from '#shared/bench/run-state'

export type RunRow = typeof runs.$inferSelect

/** A run with what it is painted from: one row of the database's answer. */
export const RUN_COLUMNS = {
  run: runs,
  schemeName: schemes.name,
  headNumber: schemes.headNumber,
  revision: revisions.number,
  body: revisions.body,
  materials: revisions.materials,
  startedByName: persons.name,
}

/** A run of the acting workshop with its frozen finish, or run/not-found. */
export async function runInWorkshop(tx: Ctx, runId: string) {
  const [found] = await tx.db.select(RUN_COLUMNS).from(runs)
    .innerJoin(schemes, eq(schemes.id, runs.schemeId))
    .innerJoin(revisions, eq(revisions.id, runs.revisionId))
    .leftJoin(persons, eq(persons.id, runs.startedBy))
    .where(and(eq(runs.id, runId), eq(runs.workshopId, tx.workshopId)))
  if (!found) throw new Problem({ code: 'run/not-found' })
  return found
}

/** A run as its list and its page need it. */
export type RunWithFinish = Awaited<ReturnType<typeof runInWorkshop>>

/** Holds a run until the transaction ends, so that acts of one run arrive one batch after another; run/not-found when it is not there. */
export async function holdRun(tx: Ctx, runId: string): Promise<void> {
  const [held] = await tx.db.select({ id: runs.id }).from(runs).where(and(eq(runs.id, runId), eq(runs.workshopId, tx.workshopId))).for('update')
  if (!held) throw new Problem({ code: 'run/not-found' })
}

/** What a run is made of: its steps, as they were worked out on the day it began. */
export function planOfRow({ body, materials, run }: Pick<RunWithFinish, 'body' | 'materials' | 'run'>): RunPlan {
  return runPlan({ body, materials, pieces: run.pieces, stepsForm: run.stepsForm, madeOf: run.madeOf })
}
