import { and, asc, eq, ne, sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { bottles, paints } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { BottleFound, BottleQuery, BottleView } from '#shared/shelf/bottle'
import { bottlesOfPaint, leftOfBottle } from './bottle-rows'

/** Every bottle of a paint, the oldest first, retired ones too; or paint/not-found. */
export async function listBottles(ctx: Ctx, paintId: string): Promise<BottleView[]> {
  assertMay(ctx, 'shelf:read')
  return inTransaction(ctx, async (tx) => {
    await paintIsThere(tx, paintId)
    return bottlesOfPaint(tx, paintId)
  })
}

/** Bottles in use with a code that was scanned, in capitals or not; all that are in use without one. A maker's code may stand on several. */
export async function findBottles(ctx: Ctx, { code }: BottleQuery): Promise<BottleFound[]> {
  assertMay(ctx, 'shelf:read')
  return inTransaction(ctx, tx => tx.db.select({
    id: bottles.id, paintId: bottles.paintId, code: bottles.code, lot: bottles.lot, ml: leftOfBottle,
    state: bottles.state, openedOn: bottles.openedOn, version: bottles.version, paintName: paints.name,
  }).from(bottles).innerJoin(paints, eq(paints.id, bottles.paintId))
    .where(and(
      eq(bottles.workshopId, tx.workshopId), ne(bottles.state, 'retired'),
      code === undefined ? undefined : sql`lower(${bottles.code}) = ${code.toLowerCase()}`,
    ))
    .orderBy(asc(paints.name), asc(bottles.createdAt), asc(bottles.id)))
}

/** Makes sure a paint is of the acting workshop. */
export async function paintIsThere(tx: Ctx, paintId: string): Promise<void> {
  const [paint] = await tx.db.select({ id: paints.id }).from(paints).where(and(eq(paints.id, paintId), eq(paints.workshopId, tx.workshopId)))
  if (!paint) throw new Problem({ code: 'paint/not-found' })
}
