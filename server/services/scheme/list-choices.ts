import { and, asc, eq, gt, isNotNull, ne } from 'drizzle-orm'
import { persons, schemes } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { may } from '#shared/people/may'
import type { WallChoices } from '#shared/scheme/wall/wall-wish'

/** Fish offered at most: beyond so many, words find faster than a list. */
const FISH_MOST = 200

/** What the wall can be narrowed by. Who may not read recipes sees the fish of published schemes, and no people. */
export async function listChoices(ctx: Ctx): Promise<WallChoices> {
  assertMay(ctx, 'scheme:look')
  return inTransaction(ctx, async (tx) => {
    const isRecipe = may(tx.role, 'scheme:read')
    const fish = await tx.db.selectDistinct({ fish: schemes.fish }).from(schemes)
      .where(and(eq(schemes.workshopId, tx.workshopId), ne(schemes.fish, ''), isRecipe ? undefined : gt(schemes.headNumber, 0)))
      .orderBy(asc(schemes.fish)).limit(FISH_MOST)
    const people = !isRecipe
      ? []
      : await tx.db.selectDistinct({ id: persons.id, name: persons.name }).from(schemes).innerJoin(persons, eq(persons.id, schemes.savedBy))
          .where(and(eq(schemes.workshopId, tx.workshopId), isNotNull(schemes.savedBy))).orderBy(asc(persons.name))
    return { fish: fish.map(row => row.fish), people }
  })
}
