import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { persons, revisions, schemes } from '#server/db/tables'
import type { Origin, SchemeView } from '#shared/scheme/scheme-view'
import { listRevisions } from './list-revisions'
import { materialsToday } from './materials-today'
import { schemeInWorkshop } from './scheme-in-workshop'
import { schemeView } from './scheme-view'

/** A scheme with its draft, what it can be made with today, and its revisions. */
export async function getScheme(ctx: Ctx, schemeId: string): Promise<SchemeView> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    return schemeView(scheme, {
      materials: await materialsToday(tx, scheme.draft),
      savedByName: await nameOf(tx, scheme.savedBy),
      origin: await originOf(tx, scheme.forkedFrom),
      revisions: await listRevisions(tx, schemeId),
    })
  })
}

/** The name of a colleague; null for somebody who left. */
export async function nameOf(tx: Ctx, personId: string | null): Promise<string | null> {
  if (personId === null) return null
  const [person] = await tx.db.select({ name: persons.name }).from(persons).where(eq(persons.id, personId))
  return person?.name ?? null
}

async function originOf(tx: Ctx, revisionId: string | null): Promise<Origin | null> {
  if (revisionId === null) return null
  const [origin] = await tx.db.select({ schemeId: schemes.id, schemeName: schemes.name, number: revisions.number })
    .from(revisions).innerJoin(schemes, eq(schemes.id, revisions.schemeId))
    .where(and(eq(revisions.id, revisionId), eq(revisions.workshopId, tx.workshopId)))
  return origin ?? null
}
