import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { writePaintsCsv } from '#shared/files/paints-csv'
import type { PaintsFileQuery } from '#shared/files/paints-plan'
import { may } from '#shared/people/may'
import { shelfLines } from './shelf-lines'

/** The whole shelf as CSV, retired paints too; the price only for those who may see cost. */
export async function writePaintsFile(ctx: Ctx, { form, bom }: PaintsFileQuery): Promise<string> {
  assertMay(ctx, 'shelf:read')
  const lines = await inTransaction(ctx, shelfLines)
  return writePaintsCsv(lines.map(({ line }) => line), { separator: form === 'comma' ? ',' : ';', bom, priced: may(ctx.role, 'shelf:cost') })
}
