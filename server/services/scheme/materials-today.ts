import { and, asc, eq, inArray, or } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { renewOptics } from '#server/services/shelf/renew-optics'
import { blanks, paintOptics, paints } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { SchemeBody } from '#shared/scheme/body'
import type { Materials, PaintSnapshot } from '#shared/scheme/materials'
import { usedPaintIds } from '#shared/scheme/used-materials'
import type { StoredOptics } from '#shared/shelf/stored-optics'

function paintSnapshot(row: typeof paints.$inferSelect, optics: StoredOptics): PaintSnapshot {
  return {
    id: row.id,
    name: row.name,
    kind: row.kind,
    base: row.base,
    reducerPer100: row.reducerPer100,
    filmPerPass: row.filmPerPass,
    volumeSolids: row.volumeSolids,
    density: row.density,
    ...row.potLifeMinutes === null ? {} : { potLifeMinutes: row.potLifeMinutes },
    ...row.twoPart === null ? {} : { twoPart: row.twoPart },
    hazards: row.hazards,
    opticsId: row.opticsId,
    optics,
  }
}

/**
 * What a draft is made with today: every paint that can be used, those of the draft that no longer can, and the blank as it is now.
 * With `only: 'used'` just the paints of the draft.
 */
export async function materialsToday(
  tx: Ctx, body: Pick<SchemeBody, 'stack' | 'blankId'>, only: 'shelf' | 'used' = 'shelf',
): Promise<Materials> {
  await renewOptics(tx)
  const used = usedPaintIds(body)
  const isUsed = inArray(paints.id, used)
  const rows = await tx.db.select({ paint: paints, optics: paintOptics.data })
    .from(paints).innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
    .where(and(eq(paints.workshopId, tx.workshopId), only === 'used' ? isUsed : or(eq(paints.retired, false), isUsed)))
    .orderBy(asc(paints.name), asc(paints.id))
  const [blank] = await tx.db.select({ id: blanks.id, shape: blanks.shape }).from(blanks)
    .where(and(eq(blanks.id, body.blankId), eq(blanks.workshopId, tx.workshopId)))
  if (!blank) throw new Problem({ code: 'blank/not-found' })
  return { paints: rows.map(row => paintSnapshot(row.paint, row.optics)), blank }
}
