import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { photos } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { PhotoView } from '#shared/photos/photo-view'

export type PhotoRow = typeof photos.$inferSelect

/** The only way from a photo's row to the wire; its file's name, bytes and hash stay behind. */
export function photoView(row: PhotoRow): PhotoView {
  return {
    id: row.id, schemeId: row.schemeId, runId: row.runId, width: row.width, height: row.height, alt: row.alt, addedAt: row.createdAt.toISOString(),
  }
}

/** A photo of this workshop, or photo/not-found. Call inside a transaction. */
export async function photoInWorkshop(tx: Ctx, photoId: string): Promise<PhotoRow> {
  const [row] = await tx.db.select().from(photos).where(and(eq(photos.id, photoId), eq(photos.workshopId, tx.workshopId)))
  if (!row) throw new Problem({ code: 'photo/not-found' })
  return row
}
