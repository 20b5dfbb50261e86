import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { blanks } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'

/** Refuses a blank that is not the acting workshop's own: a reference alone would not be checked against the workshop. */
export async function blankInWorkshop(tx: Ctx, blankId: string): Promise<void> {
  const [blank] = await tx.db.select({ id: blanks.id }).from(blanks).where(and(eq(blanks.id, blankId), eq(blanks.workshopId, tx.workshopId)))
  if (!blank) throw new Problem({ code: 'blank/not-found' })
}
