import { and, desc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { blanks, revisions } from '#server/db/tables'
import type { CardContent } from '#shared/cards/card'
import { cardChips } from '#shared/cards/card-chips'
import { Problem } from '#shared/errors/problem'

/** What a card tells of a finish by itself, and how long its blank is, mm. */
export interface FinishTold extends Pick<CardContent, 'blank' | 'chips'> { lengthMm: number }

/** What a customer may know of a scheme's newest revision: its blank, and its colours as seen; a draft tells nothing. Call inside a transaction. */
export async function finishTold(tx: Ctx, schemeId: string): Promise<FinishTold> {
  const [head] = await tx.db.select({ body: revisions.body, materials: revisions.materials }).from(revisions)
    .where(and(eq(revisions.schemeId, schemeId), eq(revisions.workshopId, tx.workshopId))).orderBy(desc(revisions.number)).limit(1)
  if (!head) throw new Problem({ code: 'scheme/never-published' })
  const [blank] = await tx.db.select({ name: blanks.name }).from(blanks).where(and(eq(blanks.id, head.body.blankId), eq(blanks.workshopId, tx.workshopId)))
  return { blank: blank?.name ?? '', chips: cardChips(head), lengthMm: head.materials.blank.shape.length }
}
