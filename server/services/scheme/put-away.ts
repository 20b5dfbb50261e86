import { and, eq, inArray, isNull, sql } from 'drizzle-orm'
import { runs, schemes } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { PutAway, PutAwayView, StayReason } from '#shared/scheme/wall/wall-wish'

/**
 * Puts schemes away, out of the lists, or brings them back; drafts, revisions, runs and cards stay as they are. Each that stays as it
 * was is named with the reason: it is gone, it is so already, or a run of it goes on.
 */
export async function putAway(ctx: Ctx, { ids, away }: PutAway): Promise<PutAwayView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const wanted = [...new Set(ids)]
    // Held in one order, so that two who put away the same at once wait for each other instead of failing.
    const found = await tx.db.select({ id: schemes.id, name: schemes.name, retired: schemes.retired }).from(schemes)
      .where(and(eq(schemes.workshopId, tx.workshopId), inArray(schemes.id, wanted))).orderBy(schemes.id).for('update')
    const byId = new Map(found.map(scheme => [scheme.id, scheme]))
    const onBench = away ? await schemesOnBench(tx, wanted) : new Set<string>()
    const whyStays = (id: string): StayReason | null => {
      const scheme = byId.get(id)
      if (!scheme) return 'gone'
      if (scheme.retired === away) return 'already'
      return onBench.has(id) ? 'bench' : null
    }
    const goes = wanted.filter(id => whyStays(id) === null)
    if (goes.length > 0) {
      await tx.db.update(schemes).set({ retired: away, version: sql`${schemes.version} + 1` })
        .where(and(eq(schemes.workshopId, tx.workshopId), inArray(schemes.id, goes)))
    }
    return {
      done: goes.map(id => ({ id, name: byId.get(id)!.name })),
      stayed: wanted.flatMap((id) => {
        const why = whyStays(id)
        return why ? [{ id, name: byId.get(id)?.name ?? null, why }] : []
      }),
    }
  })
}

async function schemesOnBench(tx: Ctx, ids: readonly string[]): Promise<ReadonlySet<string>> {
  const rows = await tx.db.selectDistinct({ id: runs.schemeId }).from(runs)
    .where(and(eq(runs.workshopId, tx.workshopId), inArray(runs.schemeId, [...ids]), isNull(runs.finishedAt)))
  return new Set(rows.map(({ id }) => id))
}
