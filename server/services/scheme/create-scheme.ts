import { randomUUID } from 'node:crypto'
import { and, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { paints, schemes } from '#server/db/tables'
import type { SchemeBody } from '#shared/scheme/body'
import type { SchemeStart } from '#shared/scheme/scheme-input'
import type { SchemeView } from '#shared/scheme/scheme-view'
import { newSchemeBody, whiteBase } from '#shared/scheme/new-scheme'
import { blankInWorkshop } from './blank-in-workshop'
import { getScheme } from './get-scheme'

/** Starts a scheme on a blank of the workshop; without a body it starts from a good ground and a white base. */
export async function createScheme(ctx: Ctx, start: SchemeStart): Promise<SchemeView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    await blankInWorkshop(tx, start.blankId)
    const draft = start.body ? { ...start.body, blankId: start.blankId } : await firstBody(tx, start.blankId)
    const [scheme] = await tx.db.insert(schemes)
      .values({ workshopId: tx.workshopId, name: start.name, fish: start.fish, blankId: start.blankId, draft, savedBy: tx.personId })
      .returning({ id: schemes.id })
    return getScheme(tx, scheme!.id)
  })
}

async function firstBody(tx: Ctx, blankId: string): Promise<SchemeBody> {
  const bases = await tx.db.select().from(paints)
    .where(and(eq(paints.workshopId, tx.workshopId), eq(paints.retired, false), inArray(paints.kind, ['opaque', 'primer'])))
  const paint = whiteBase(bases)
  return newSchemeBody(blankId, paint ? { coatId: randomUUID(), paint, rest: paint.restMinutes } : undefined)
}
