import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { RevisionView } from '#shared/scheme/scheme-view'
import { nameOf } from './get-scheme'
import { revisionInWorkshop, schemeInWorkshop } from './scheme-in-workshop'
import { revisionView } from './scheme-view'

/** A frozen version with what it was made with then, whatever the shelf holds today. */
export async function getRevision(ctx: Ctx, schemeId: string, number: number): Promise<RevisionView> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    const revision = await revisionInWorkshop(tx, scheme.id, number)
    return revisionView(revision, scheme.name, await nameOf(tx, revision.publishedBy))
  })
}
