import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { photos, runs } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { PhotoView } from '#shared/photos/photo-view'

export type PhotoRow = typeof photos.$inferSelect

/** The only way from a photo's row to the wire; its file's name, bytes and hash stay behind. */
export function photoView(row: PhotoRow, runNumber: number | null): PhotoView {
  return {
    id: row.id,
    schemeId: row.schemeId,
    run: row.runId && runNumber !== null ? { id: row.runId, number: runNumber } : null,
    width: row.width,
    height: row.height,
    alt: row.alt,
    addedAt: row.createdAt.toISOString(),
  }
}

/** The same, with its run's number read. Call inside a transaction. */
export async function viewOf(tx: Ctx, row: PhotoRow): Promise<PhotoView> {
  if (!row.runId) return photoView(row, null)
  const [run] = await tx.db.select({ number: runs.number }).from(runs).where(and(eq(runs.id, row.runId), eq(runs.workshopId, tx.workshopId)))
  return photoView(row, run?.number ?? null)
}

/** A photo of this workshop, or photo/not-found. Call inside a transaction. */
export async function photoInWorkshop(tx: Ctx, photoId: string): Promise<PhotoRow> {
  const [row] = await tx.db.select().from(photos).where(and(eq(photos.id, photoId), eq(photos.workshopId, tx.workshopId)))
  if (!row) throw new Problem({ code: 'photo/not-found' })
  return row
}
