import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { bottles } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { BottleDraft, BottleView } from '#shared/shelf/bottle'
import { bottleInWorkshop } from './bottle-rows'
import { paintIsThere } from './list-bottles'
import { newBottleCode } from './new-bottle-code'
import { putBottleVolume } from './set-paint-volume'

/** Less than this apart, mL, nobody meant to change what is left: the figure on the page was rounded. */
const SAME_ML = 0.05

/** Puts one more bottle of a paint on the shelf; without a code of its own it gets one to be written on it. */
export async function addBottle(ctx: Ctx, paintId: string, draft: BottleDraft): Promise<BottleView> {
  assertMay(ctx, 'shelf:change')
  return inTransaction(ctx, async (tx) => {
    await paintIsThere(tx, paintId)
    const { code = newBottleCode(), lot, ml, state, openedOn } = draft
    const [bottle] = await tx.db.insert(bottles).values({ workshopId: tx.workshopId, paintId, code, lot, ml, state, openedOn }).returning({ id: bottles.id })
    return bottleInWorkshop(tx, bottle!.id)
  })
}

/** Changes a bottle that is still at `version`: its label, its state, or what somebody sees is left in it. What runs took before is then settled. */
export async function changeBottle(ctx: Ctx, bottleId: string, version: number, draft: BottleDraft): Promise<BottleView> {
  assertMay(ctx, 'shelf:change')
  return inTransaction(ctx, async (tx) => {
    const [held] = await tx.db.select({ version: bottles.version, code: bottles.code }).from(bottles)
      .where(and(eq(bottles.id, bottleId), eq(bottles.workshopId, tx.workshopId))).for('update')
    if (!held) throw new Problem({ code: 'bottle/not-found' })
    if (held.version !== version) throw new Problem({ code: 'bottle/changed-meanwhile' })
    const before = await bottleInWorkshop(tx, bottleId)
    const { code = held.code, lot, ml, state, openedOn } = draft
    await tx.db.update(bottles).set({ code, lot, state, openedOn, version: version + 1 }).where(and(eq(bottles.id, bottleId), eq(bottles.workshopId, tx.workshopId)))
    if (Math.abs(before.ml - ml) >= SAME_ML) await putBottleVolume(tx, bottleId, ml)
    return bottleInWorkshop(tx, bottleId)
  })
}
