import { asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { leftOfPaint } from '#server/services/shelf/bottle-rows'
import { paintOptics, paints } from '#server/db/tables'
import type { PaintLine } from '#shared/files/paint-columns'
import { may } from '#shared/people/may'
import { draftOfFilePaint, filePaint } from './file-paint'

/** A paint of the shelf as a line of a file, and the version it is at. */
export interface ShelfLine { line: PaintLine & { id: string, retired: boolean }, version: number }

/** Every paint of the workshop, by name; prices only for those who may see cost. */
export async function shelfLines(tx: Ctx): Promise<ShelfLine[]> {
  const priced = may(tx.role, 'shelf:cost')
  const rows = await tx.db.select({ paint: paints, left: leftOfPaint }).from(paints)
    // Beside another table, so that a paint's own id is named as such inside the sum of its bottles.
    .innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
    .where(eq(paints.workshopId, tx.workshopId)).orderBy(asc(paints.name), asc(paints.id))
  return rows.map(({ paint, left }) => ({
    version: paint.version,
    line: {
      ...draftOfFilePaint(filePaint(paint)),
      id: paint.id,
      volumeLeft: Number(left.toFixed(2)),
      ...priced && paint.pricePerMl !== null ? { pricePerMl: paint.pricePerMl } : {},
      retired: paint.retired,
    },
  }))
}
