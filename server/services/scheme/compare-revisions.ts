import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { CompareQuery } from '#shared/scheme/scheme-input'
import type { CompareView } from '#shared/scheme/scheme-view'
import { usedMaterials } from '#shared/scheme/used-materials'
import { materialsToday } from './materials-today'
import { revisionInWorkshop, schemeInWorkshop, type SchemeRow } from './scheme-in-workshop'

/** Two versions of one scheme, each with what it was made with (the draft: with today's shelf). */
export async function compareRevisions(ctx: Ctx, schemeId: string, query: CompareQuery): Promise<CompareView> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    return {
      scheme: { id: scheme.id, name: scheme.name },
      from: await sideOf(tx, scheme, query.from),
      to: await sideOf(tx, scheme, query.to),
    }
  })
}

async function sideOf(tx: Ctx, scheme: SchemeRow, which: CompareQuery['from']): Promise<CompareView['from']> {
  if (which === 'draft') {
    const materials = usedMaterials(scheme.draft, await materialsToday(tx, scheme.draft, 'used'))
    return { number: null, note: '', body: scheme.draft, materials }
  }
  const { number, note, body, materials } = await revisionInWorkshop(tx, scheme.id, which)
  return { number, note, body, materials }
}
