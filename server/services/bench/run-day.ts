import { and, asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { bottlesByIds, bottlesInUse } from '#server/services/shelf/bottle-rows'
import { bottleUses, persons, runPainters } from '#server/db/tables'
import type { RunView } from '#shared/bench/run-view'
import type { RunWithFinish } from './run-in-workshop'
import { startBottlesOf } from './settle-stock'

/** Who paints, and what stands on the bench. */
export type RunDay = Pick<RunView, 'painters' | 'startBottles' | 'bottles'>

/** Who paints in a run, which bottles it began with, and every bottle of its paints that could be taken. */
export async function dayOf(tx: Ctx, { run, materials }: RunWithFinish): Promise<RunDay> {
  const painters = await tx.db.select({ id: persons.id, name: persons.name }).from(runPainters)
    .innerJoin(persons, eq(persons.id, runPainters.personId))
    .where(and(eq(runPainters.runId, run.id), eq(runPainters.workshopId, tx.workshopId))).orderBy(asc(persons.name), asc(persons.id))
  const startBottles = await startBottlesOf(tx, run.id)
  const used = await tx.db.select({ bottleId: bottleUses.bottleId }).from(bottleUses)
    .where(and(eq(bottleUses.runId, run.id), eq(bottleUses.workshopId, tx.workshopId)))
  const inUse = await bottlesInUse(tx, materials.paints.map(paint => paint.id))
  const known = new Set(inUse.map(bottle => bottle.id))
  const others = [...new Set([...Object.values(startBottles), ...used.flatMap(({ bottleId }) => bottleId ?? [])])].filter(id => !known.has(id))
  const bottles = [...inUse, ...await bottlesByIds(tx, others)].map(({ id, paintId, code, lot, ml }) => ({ id, paintId, code, lot, ml }))
  return { painters, startBottles, bottles }
}
