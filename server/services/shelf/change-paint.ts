import { isDeepStrictEqual } from 'node:util'
import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { paintOptics, paints } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { PaintChange, PaintView } from '#shared/shelf/paint-view'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { deriveOptics } from './derive-optics'
import { paintValues } from './paint-values'
import { paintView } from './paint-view'
import { setPaintVolume } from './set-paint-volume'

/**
 * Changes a paint that is still at `version`. A new colour gets new optical data; the old stays where revisions point at it,
 * so that no revision changes its look.
 */
export async function changePaint(ctx: Ctx, paintId: string, version: number, change: PaintChange): Promise<PaintView> {
  assertMay(ctx, 'shelf:change')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select({ paint: paints, optics: paintOptics })
      .from(paints).innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
      .where(and(eq(paints.id, paintId), eq(paints.workshopId, tx.workshopId))).for('update', { of: paints })
    if (!row) throw new Problem({ code: 'paint/not-found' })
    if (row.paint.version !== version) throw new Problem({ code: 'paint/changed-meanwhile' })

    const sameColour = isDeepStrictEqual(row.paint.known, change.known) && row.optics.engineVersion === ENGINE_VERSION
    let { id: opticsId, data } = row.optics
    if (!sameColour) {
      data = deriveOptics(change.known)
      const [fresh] = await tx.db.insert(paintOptics)
        .values({ workshopId: tx.workshopId, engineVersion: data.engineVersion, data }).returning({ id: paintOptics.id })
      opticsId = fresh!.id
    }
    const [paint] = await tx.db.update(paints)
      .set({ ...paintValues(change), retired: change.retired ?? row.paint.retired, opticsId, version: version + 1, changedAt: new Date() })
      .where(and(eq(paints.id, paintId), eq(paints.workshopId, tx.workshopId))).returning()
    return paintView({ ...paint!, volumeLeft: await setPaintVolume(tx, paintId, change.volumeLeft) }, data, tx.role)
  })
}
