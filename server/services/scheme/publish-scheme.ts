import { eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { revisions, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { whyNotPublishable } from '#shared/scheme/publishable'
import type { Publish } from '#shared/scheme/scheme-input'
import type { RevisionView } from '#shared/scheme/scheme-view'
import { usedMaterials } from '#shared/scheme/used-materials'
import { bodyHash } from './body-hash'
import { nameOf } from './get-scheme'
import { materialsToday } from './materials-today'
import { holdScheme, revisionInWorkshop, type SchemeRow } from './scheme-in-workshop'
import { revisionView } from './scheme-view'

/** Freezes the draft one is looking at as the next revision, with the paints and the blank as they are today. */
export async function publishScheme(ctx: Ctx, schemeId: string, version: number, { note }: Publish): Promise<RevisionView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    // Held until the end: of two publishes at once the second finds the first one's revision.
    const scheme = await holdScheme(tx, schemeId, version)
    const body = scheme.draft
    const materials = usedMaterials(body, await materialsToday(tx, body, 'used'))
    const reasons = whyNotPublishable(body, materials)
    if (reasons.length > 0) throw new Problem({ code: 'scheme/not-publishable', reasons })
    const hash = bodyHash(body, materials)
    if (await headHash(tx, scheme) === hash) throw new Problem({ code: 'scheme/nothing-changed' })

    const number = scheme.headNumber + 1
    const [revision] = await tx.db.insert(revisions)
      .values({ workshopId: tx.workshopId, schemeId, number, note, body, materials, bodyHash: hash, engineVersion: ENGINE_VERSION, publishedBy: tx.personId })
      .returning()
    await tx.db.update(schemes).set({ headNumber: number }).where(eq(schemes.id, schemeId))
    return revisionView(revision!, scheme.name, await nameOf(tx, tx.personId))
  })
}

async function headHash(tx: Ctx, scheme: SchemeRow): Promise<string | null> {
  return scheme.headNumber === 0 ? null : (await revisionInWorkshop(tx, scheme.id, scheme.headNumber)).bodyHash
}
