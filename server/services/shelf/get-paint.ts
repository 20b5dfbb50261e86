import { and, asc, eq, sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { paintOptics, paints, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { PaintUse, PaintView } from '#shared/shelf/paint-view'
import { leftOfPaint } from './bottle-rows'
import { paintView } from './paint-view'
import { renewOptics } from './renew-optics'

/** One paint of the workshop, or paint/not-found. */
export async function getPaint(ctx: Ctx, paintId: string): Promise<PaintView> {
  assertMay(ctx, 'shelf:read')
  return inTransaction(ctx, async (tx) => {
    await renewOptics(tx)
    const [row] = await tx.db.select({ paint: paints, optics: paintOptics.data, volumeLeft: leftOfPaint })
      .from(paints).innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
      .where(and(eq(paints.id, paintId), eq(paints.workshopId, tx.workshopId)))
    if (!row) throw new Problem({ code: 'paint/not-found' })
    return paintView({ ...row.paint, volumeLeft: row.volumeLeft }, row.optics, tx.role)
  })
}

/** The schemes whose draft lays this paint, by name, or paint/not-found. */
export async function listPaintUses(ctx: Ctx, paintId: string): Promise<PaintUse[]> {
  assertMay(ctx, 'shelf:read')
  return inTransaction(ctx, async (tx) => {
    const [paint] = await tx.db.select({ id: paints.id }).from(paints).where(and(eq(paints.id, paintId), eq(paints.workshopId, tx.workshopId)))
    if (!paint) throw new Problem({ code: 'paint/not-found' })
    const uses = sql`jsonb_path_exists(${schemes.draft}, '$.stack[*].coat.mix.parts[*] ? (@.paintId == $id)', jsonb_build_object('id', ${paintId}::text))`
    return tx.db.select({ schemeId: schemes.id, name: schemes.name }).from(schemes)
      .where(and(eq(schemes.workshopId, tx.workshopId), eq(schemes.retired, false), uses))
      .orderBy(asc(schemes.name))
  })
}
