import { and, asc, count, eq } from 'drizzle-orm'
import { savedSearches } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { Problem } from '#shared/errors/problem'
import { SAVED_SEARCHES_MAX, type SavedSearchView, type SearchToSave } from '#shared/scheme/wall/wall-wish'

const columns = { id: savedSearches.id, name: savedSearches.name, wish: savedSearches.wish }
const own = (tx: Ctx) => and(eq(savedSearches.workshopId, tx.workshopId), eq(savedSearches.personId, tx.personId))

/** The searches the acting person kept in this workshop, oldest first. */
export async function listSavedSearches(ctx: Ctx): Promise<SavedSearchView[]> {
  assertMay(ctx, 'scheme:look')
  return inTransaction(ctx, tx => tx.db.select(columns).from(savedSearches).where(own(tx)).orderBy(asc(savedSearches.createdAt), asc(savedSearches.id)))
}

/** Keeps a search under a name; the same name again means the new search. */
export async function saveSearch(ctx: Ctx, { name, wish }: SearchToSave): Promise<SavedSearchView> {
  assertMay(ctx, 'scheme:look')
  return inTransaction(ctx, async (tx) => {
    const [saved] = await tx.db.insert(savedSearches).values({ workshopId: tx.workshopId, personId: tx.personId, name, wish })
      .onConflictDoUpdate({ target: [savedSearches.workshopId, savedSearches.personId, savedSearches.name], set: { wish } }).returning(columns)
    const [kept] = await tx.db.select({ searches: count() }).from(savedSearches).where(own(tx))
    if (kept!.searches > SAVED_SEARCHES_MAX)
      throw new Problem({ code: 'input/invalid', fields: [{ path: 'name', message: `You keep ${SAVED_SEARCHES_MAX} searches already. Forget one first.` }] })
    return saved!
  })
}

/** Forgets a search; one that is not there, or is another person's, is as forgotten as it can be. */
export async function forgetSearch(ctx: Ctx, searchId: string): Promise<void> {
  assertMay(ctx, 'scheme:look')
  await inTransaction(ctx, tx => tx.db.delete(savedSearches).where(and(own(tx), eq(savedSearches.id, searchId))))
}
