import { eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { bottles } from '#server/db/tables'
import type { BottleView } from '#shared/shelf/bottle'
import { bottleAtHand } from '#shared/shelf/bottle'
import { bottlesOfPaint, takenFromBottle } from './bottle-rows'
import { newBottleCode } from './new-bottle-code'

/** Less than this apart, mL, two volumes are the same: a figure read from the page has been rounded. */
const SAME_ML = 0.05

/**
 * Makes what is left of a paint come to `ml`, as somebody wrote who looked at the shelf as a whole: the bottle at hand takes
 * the difference, and those after it what it cannot. A paint without a bottle gets an open one. Answers what is left now, mL.
 */
export async function setPaintVolume(tx: Ctx, paintId: string, ml: number): Promise<number> {
  const inUse = (await bottlesOfPaint(tx, paintId)).filter(bottle => bottle.state !== 'retired')
  const now = inUse.reduce((sum, bottle) => sum + bottle.ml, 0)
  let more = ml - now
  if (Math.abs(more) < SAME_ML) return now
  const order = inHandOrder(inUse)
  if (order.length === 0) {
    await tx.db.insert(bottles).values({ workshopId: tx.workshopId, paintId, code: newBottleCode(), ml })
    return ml
  }
  for (const bottle of order) {
    const left = Math.max(0, bottle.ml + more)
    await putBottleVolume(tx, bottle.id, left)
    more -= left - bottle.ml
    if (Math.abs(more) < SAME_ML) break
  }
  return ml
}

/** Notes what is in a bottle now: what runs took before no longer counts. */
export async function putBottleVolume(tx: Ctx, bottleId: string, ml: number): Promise<void> {
  await tx.db.update(bottles).set({ ml, usedBefore: takenFromBottle }).where(eq(bottles.id, bottleId))
}

function inHandOrder(inUse: readonly BottleView[]): BottleView[] {
  const full = [...inUse].filter(bottle => bottle.ml > 0)
  const order: BottleView[] = []
  for (let next = bottleAtHand(full); next; next = bottleAtHand(full.filter(bottle => !order.includes(bottle)))) order.push(next)
  return [...order, ...inUse.filter(bottle => bottle.ml <= 0)]
}
