import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { CompareQuery } from '#shared/scheme/scheme-input'
import type { CompareView } from '#shared/scheme/scheme-view'
import { usedMaterials } from '#shared/scheme/used-materials'
import { materialsToday } from './materials-today'
import { revisionInWorkshop, schemeInWorkshop, type SchemeRow } from './scheme-in-workshop'

/** Two versions of one scheme or of two, each with what it was made with (a draft: with today's shelf). */
export async function compareRevisions(ctx: Ctx, schemeId: string, { from, to, other }: CompareQuery): Promise<CompareView> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    const second = other === undefined || other === schemeId ? scheme : await schemeInWorkshop(tx, other)
    return { from: await sideOf(tx, scheme, from), to: await sideOf(tx, second, to) }
  })
}

async function sideOf(tx: Ctx, { id, name, draft }: SchemeRow, which: CompareQuery['from']): Promise<CompareView['from']> {
  const scheme = { id, name }
  if (which === 'draft') {
    const materials = usedMaterials(draft, await materialsToday(tx, draft, 'used'))
    return { scheme, number: null, note: '', body: draft, materials }
  }
  const { number, note, body, materials } = await revisionInWorkshop(tx, id, which)
  return { scheme, number, note, body, materials }
}
