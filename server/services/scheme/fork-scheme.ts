import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { schemes } from '#server/db/tables'
import type { Fork } from '#shared/scheme/scheme-input'
import type { SchemeView } from '#shared/scheme/scheme-view'
import { getScheme } from './get-scheme'
import { revisionInWorkshop, schemeInWorkshop } from './scheme-in-workshop'

/** Starts a colourway: another scheme from a revision (or the draft), with the same coat ids, so that both can be compared for good. */
export async function forkScheme(ctx: Ctx, schemeId: string, fork: Fork): Promise<SchemeView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    const number = fork.number ?? scheme.headNumber
    const origin = number === 0 ? null : await revisionInWorkshop(tx, schemeId, number)
    const draft = fork.number === undefined ? scheme.draft : origin!.body
    const [colourway] = await tx.db.insert(schemes).values({
      workshopId: tx.workshopId, name: fork.name, fish: fork.fish ?? scheme.fish, blankId: draft.blankId, draft, savedBy: tx.personId, forkedFrom: origin?.id ?? null,
    }).returning({ id: schemes.id })
    return getScheme(tx, colourway!.id)
  })
}
