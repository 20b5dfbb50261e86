import { and, eq, ne } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { paintOptics, paints } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { deriveOptics } from './derive-optics'

/**
 * Derives anew what another version of the engine made of a workshop's paints, before anything is shown or drawn by it. What a
 * revision froze stays as it was. A paint whose colour this engine cannot use keeps what it has, and says so when it is next saved.
 */
export async function renewOptics(tx: Ctx): Promise<void> {
  const old = await tx.db.select({ id: paints.id, known: paints.known })
    .from(paints).innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
    .where(and(eq(paints.workshopId, tx.workshopId), ne(paintOptics.engineVersion, ENGINE_VERSION)))
    .for('update', { of: paints })
  for (const { id, known } of old) {
    const data = derived(known)
    if (!data) continue
    const [fresh] = await tx.db.insert(paintOptics).values({ workshopId: tx.workshopId, engineVersion: data.engineVersion, data }).returning({ id: paintOptics.id })
    await tx.db.update(paints).set({ opticsId: fresh!.id }).where(and(eq(paints.id, id), eq(paints.workshopId, tx.workshopId)))
  }
}

function derived(known: typeof paints.$inferSelect['known']) {
  try {
    return deriveOptics(known)
  }
  catch (error) {
    if (error instanceof Problem) return null
    throw error
  }
}
