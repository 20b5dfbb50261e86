import { asc, eq, sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { paintOptics, paints } from '#server/db/tables'
import type { PaintListItem } from '#shared/shelf/paint-view'
import { bottlesOfPaintInUse, leftOfPaint } from './bottle-rows'
import { paintListItem } from './paint-view'
import { renewOptics } from './renew-optics'

/** The whole shelf, by name, with in how many schemes' drafts each paint is used. Filtering and sorting is the table's own. */
export async function listPaints(ctx: Ctx): Promise<PaintListItem[]> {
  assertMay(ctx, 'shelf:read')
  return inTransaction(ctx, async (tx) => {
    await renewOptics(tx)
    const used = sql<number>`(select count(*)::int from schemes s
      where s.workshop_id = ${tx.workshopId} and not s.retired
        and jsonb_path_exists(s.draft, '$.stack[*].coat.mix.parts[*] ? (@.paintId == $id)', jsonb_build_object('id', ${paints.id})))`
    const rows = await tx.db.select({ paint: paints, optics: paintOptics.data, schemes: used, bottles: bottlesOfPaintInUse, volumeLeft: leftOfPaint })
      .from(paints).innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
      .where(eq(paints.workshopId, tx.workshopId))
      .orderBy(asc(paints.name), asc(paints.id))
    return rows.map(row => paintListItem({ ...row.paint, volumeLeft: row.volumeLeft }, row.optics, row.schemes, row.bottles, tx.role))
  })
}
