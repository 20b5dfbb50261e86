import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { Problem } from '#shared/errors/problem'
import { may } from '#shared/people/may'
import type { Look } from '#shared/picture/look'
import type { PictureQuery } from '#shared/scheme/scheme-input'
import { usedMaterials } from '#shared/scheme/used-materials'
import { bodyHash } from './body-hash'
import { materialsToday } from './materials-today'
import { type RevisionRow, revisionInWorkshop, schemeInWorkshop } from './scheme-in-workshop'

/** What a picture of a scheme shows. */
export interface SchemeLook {
  look: Look
  /** Alike for the same look; says nothing of how it is made where the look is a revision's. */
  tag: string
  /** Whether it can never change: a revision's look. */
  isFrozen: boolean
}

/**
 * The look a picture is asked for: a revision's, or the draft's with today's shelf.
 * Who may not read recipes gets the newest revision as it is finished, and nothing that tells coats apart.
 */
export async function lookOfScheme(ctx: Ctx, schemeId: string, wish: Pick<PictureQuery, 'revision' | 'upTo' | 'clear'>): Promise<SchemeLook> {
  assertMay(ctx, 'scheme:look')
  const readsRecipes = may(ctx.role, 'scheme:read')
  if (wish.revision !== undefined || wish.upTo !== undefined || !wish.clear) assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    if (!readsRecipes && scheme.headNumber === 0) throw new Problem({ code: 'scheme/not-found' })
    const number = readsRecipes ? wish.revision : scheme.headNumber
    if (number !== undefined) return frozen(await revisionInWorkshop(tx, schemeId, number))
    const look = { body: scheme.draft, materials: usedMaterials(scheme.draft, await materialsToday(tx, scheme.draft, 'used')) }
    return { look, tag: bodyHash(look.body, look.materials), isFrozen: false }
  })
}

function frozen({ id, body, materials }: RevisionRow): SchemeLook {
  return { look: { body, materials }, tag: id, isFrozen: true }
}
