import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { revisions, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'

export type SchemeRow = typeof schemes.$inferSelect
export type RevisionRow = typeof revisions.$inferSelect

/** A scheme of the acting workshop, or scheme/not-found. */
export async function schemeInWorkshop(tx: Ctx, schemeId: string): Promise<SchemeRow> {
  const [scheme] = await tx.db.select().from(schemes).where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
  if (!scheme) throw new Problem({ code: 'scheme/not-found' })
  return scheme
}

/** A scheme held until the transaction ends, when its draft is still at `version`; scheme/changed-meanwhile with the present version otherwise. */
export async function holdScheme(tx: Ctx, schemeId: string, version: number): Promise<SchemeRow> {
  const [scheme] = await tx.db.select().from(schemes)
    .where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId))).for('update')
  if (!scheme) throw new Problem({ code: 'scheme/not-found' })
  if (scheme.version !== version) throw new Problem({ code: 'scheme/changed-meanwhile', version: scheme.version })
  return scheme
}

/** A revision of a scheme of the acting workshop, or revision/not-found. */
export async function revisionInWorkshop(tx: Ctx, schemeId: string, number: number): Promise<RevisionRow> {
  const [revision] = await tx.db.select().from(revisions)
    .where(and(eq(revisions.schemeId, schemeId), eq(revisions.number, number), eq(revisions.workshopId, tx.workshopId)))
  if (!revision) throw new Problem({ code: 'revision/not-found' })
  return revision
}
