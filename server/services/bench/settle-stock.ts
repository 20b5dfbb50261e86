import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { bottleUses, runBottles } from '#server/db/tables'
import { paintUsed, type PaintUsed } from '#shared/bench/paint-used'
import type { RunEventView } from '#shared/bench/run-view'
import type { RunPlan } from '#shared/bench/run-state'
import type { RunWithFinish } from './run-in-workshop'
import { cellsOfRevision } from './cells-keep'

/** Which bottle each paint of a run came out of at its start, by the paint's id. */
export async function startBottlesOf(tx: Ctx, runId: string): Promise<Record<string, string>> {
  const rows = await tx.db.select({ paintId: runBottles.paintId, bottleId: runBottles.bottleId }).from(runBottles)
    .where(and(eq(runBottles.runId, runId), eq(runBottles.workshopId, tx.workshopId)))
  return Object.fromEntries(rows.map(({ paintId, bottleId }) => [paintId, bottleId]))
}

/**
 * Works out anew what a run took from the shelf, from all its acts. The run is held by the caller, so that two hand-overs
 * settle one after the other.
 */
export async function settleStock(tx: Ctx, row: RunWithFinish, plan: RunPlan, events: readonly RunEventView[]): Promise<void> {
  const { run, body, materials } = row
  const cells = cellsOfRevision(run.revisionId, materials.blank.shape)
  const used = paintUsed({ body, materials }, cells, plan, events, await startBottlesOf(tx, run.id))
  const before = await tx.db.select({ paintId: bottleUses.paintId, bottleId: bottleUses.bottleId, ml: bottleUses.ml }).from(bottleUses)
    .where(and(eq(bottleUses.runId, run.id), eq(bottleUses.workshopId, tx.workshopId)))
  if (isSame(before, used)) return
  await tx.db.delete(bottleUses).where(and(eq(bottleUses.runId, run.id), eq(bottleUses.workshopId, tx.workshopId)))
  if (used.length > 0) await tx.db.insert(bottleUses).values(used.map(each => ({ ...each, workshopId: tx.workshopId, runId: run.id })))
}

function isSame(before: readonly PaintUsed[], now: readonly PaintUsed[]): boolean {
  return before.length === now.length && now.every(({ paintId, bottleId, ml }) => before.some(each => each.paintId === paintId && each.bottleId === bottleId && each.ml === ml))
}
