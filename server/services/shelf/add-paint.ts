import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { paintOptics, paints } from '#server/db/tables'
import type { PaintDraft } from '#shared/shelf/paint'
import type { PaintView } from '#shared/shelf/paint-view'
import { deriveOptics } from './derive-optics'
import { paintValues } from './paint-values'
import { paintView } from './paint-view'
import { setPaintVolume } from './set-paint-volume'

/** Puts a paint on the shelf with the optical data the engine derives from what is known of it, and what there is of it as one open bottle. */
export async function addPaint(ctx: Ctx, draft: PaintDraft): Promise<PaintView> {
  assertMay(ctx, 'shelf:change')
  const data = deriveOptics(draft.known)
  return inTransaction(ctx, async (tx) => {
    const [optics] = await tx.db.insert(paintOptics)
      .values({ workshopId: tx.workshopId, engineVersion: data.engineVersion, data }).returning({ id: paintOptics.id })
    const [paint] = await tx.db.insert(paints)
      .values({ ...paintValues(draft), workshopId: tx.workshopId, opticsId: optics!.id }).returning()
    await setPaintVolume(tx, paint!.id, draft.volumeLeft)
    return paintView({ ...paint!, volumeLeft: draft.volumeLeft }, data, tx.role)
  })
}
