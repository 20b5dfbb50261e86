import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'

/** A scheme of this workshop that photos may stand at, or scheme/not-found. Call inside a transaction. */
export async function assertSchemeHere(tx: Ctx, schemeId: string): Promise<void> {
  const [scheme] = await tx.db.select({ id: schemes.id }).from(schemes).where(here(tx, schemeId))
  if (!scheme) throw new Problem({ code: 'scheme/not-found' })
}

/** The same, and until the transaction ends nobody else adds a photo to it or moves one: their order and number stay what was read. */
export async function holdPhotosOf(tx: Ctx, schemeId: string): Promise<void> {
  const [scheme] = await tx.db.select({ id: schemes.id }).from(schemes).where(here(tx, schemeId)).for('no key update')
  if (!scheme) throw new Problem({ code: 'scheme/not-found' })
}

const here = (tx: Ctx, schemeId: string) => and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId))
