import { and, asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { blanks } from '#server/db/tables'
import type { BlankView } from '#shared/blank/blank-view'
import { Problem } from '#shared/errors/problem'
import { blankView } from './blank-view'
import { schemesOn } from './schemes-on'

/** Every blank of the workshop, by name, with how many schemes are painted on it. */
export async function listBlanks(ctx: Ctx): Promise<BlankView[]> {
  assertMay(ctx, 'blank:read')
  return inTransaction(ctx, async (tx) => {
    const rows = await tx.db.select({ blank: blanks, schemes: schemesOn }).from(blanks)
      .where(eq(blanks.workshopId, tx.workshopId)).orderBy(asc(blanks.name), asc(blanks.id))
    return rows.map(row => blankView(row.blank, row.schemes))
  })
}

/** One blank of the workshop, or blank/not-found. */
export async function getBlank(ctx: Ctx, blankId: string): Promise<BlankView> {
  assertMay(ctx, 'blank:read')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select({ blank: blanks, schemes: schemesOn }).from(blanks)
      .where(and(eq(blanks.id, blankId), eq(blanks.workshopId, tx.workshopId)))
    if (!row) throw new Problem({ code: 'blank/not-found' })
    return blankView(row.blank, row.schemes)
  })
}
