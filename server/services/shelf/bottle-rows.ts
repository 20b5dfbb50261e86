import { and, asc, eq, inArray, ne, sql, type SQL } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { bottles, bottleUses, paints } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { BottleView } from '#shared/shelf/bottle'

const usedOf = sql`coalesce((select sum(u.ml) from ${bottleUses} u where u.bottle_id = ${bottles.id}), 0)`

/** What is left in a bottle, mL: what was in it when somebody looked, less what runs took since; never below nothing. */
export const leftOfBottle = sql<number>`greatest(0, ${bottles.ml} + ${bottles.usedBefore} - ${usedOf})`

/** What runs took from a bottle in all so far, mL. */
export const takenFromBottle = sql<number>`${usedOf}`

/** What is left of a paint in its bottles, mL; retired bottles do not count. For a query on `paints`. */
export const leftOfPaint = sql<number>`coalesce((select sum(greatest(0, b.ml + b.used_before - coalesce((select sum(u.ml) from ${bottleUses} u where u.bottle_id = b.id), 0)))
  from ${bottles} b where b.paint_id = ${paints.id} and b.state <> 'retired'), 0)`

/** How many bottles of a paint are in use: not retired. For a query on `paints`. */
export const bottlesOfPaintInUse = sql<number>`(select count(*)::int from ${bottles} b where b.paint_id = ${paints.id} and b.state <> 'retired')`

const COLUMNS = {
  id: bottles.id, paintId: bottles.paintId, code: bottles.code, lot: bottles.lot, ml: leftOfBottle,
  state: bottles.state, openedOn: bottles.openedOn, version: bottles.version,
}

/** Bottles of the acting workshop, oldest first. */
async function bottlesWhere(tx: Ctx, which: SQL | undefined): Promise<BottleView[]> {
  return tx.db.select(COLUMNS).from(bottles).where(and(eq(bottles.workshopId, tx.workshopId), which))
    .orderBy(asc(bottles.createdAt), asc(bottles.id))
}

/** Every bottle of a paint, retired ones too. */
export async function bottlesOfPaint(tx: Ctx, paintId: string): Promise<BottleView[]> {
  return bottlesWhere(tx, eq(bottles.paintId, paintId))
}

/** Bottles in use of several paints. */
export async function bottlesInUse(tx: Ctx, paintIds: readonly string[]): Promise<BottleView[]> {
  return paintIds.length === 0 ? [] : bottlesWhere(tx, and(inArray(bottles.paintId, [...paintIds]), ne(bottles.state, 'retired')))
}

/** Those of these bottles that are in the acting workshop. */
export async function bottlesByIds(tx: Ctx, ids: readonly string[]): Promise<BottleView[]> {
  return ids.length === 0 ? [] : bottlesWhere(tx, inArray(bottles.id, [...ids]))
}

/** One bottle, or bottle/not-found. */
export async function bottleInWorkshop(tx: Ctx, bottleId: string): Promise<BottleView> {
  const [found] = await bottlesByIds(tx, [bottleId])
  if (!found) throw new Problem({ code: 'bottle/not-found' })
  return found
}
