import { and, desc, eq, inArray, type SQL, sql } from 'drizzle-orm'
import { z } from 'zod'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { blanks, persons, revisions, schemes } from '#server/db/tables'
import { may } from '#shared/people/may'
import type { SchemeQuery } from '#shared/scheme/scheme-input'
import type { SchemeListItem, SchemeLookView, SchemeRowView } from '#shared/scheme/scheme-view'
import { answers, assertMayLookFor, head } from './list-filters'
import { schemeListItem, schemeLookView } from './scheme-view'

/** Where a page of the list starts: the time and the id of the last row before it. */
export const SchemesAfter = z.tuple([z.iso.datetime(), z.uuid()])
export type SchemesAfter = z.output<typeof SchemesAfter>

/** The sort key of a row, whoever reads it. */
export function schemeKey(item: SchemeRowView): SchemesAfter {
  return [item.sees === 'recipe' ? item.savedAt : item.publishedAt, item.id]
}

const coatCount = sql<number>`jsonb_array_length(jsonb_path_query_array(${schemes.draft}, '$.stack[*] ? (@.act == "coat")'))`
const maskCount = sql<number>`jsonb_array_length(${schemes.draft} -> 'masks')`

/**
 * The schemes of the workshop that answer a search, newest work first, one row more than asked for when there are more.
 * Who may not read recipes gets the published ones, as looks, and never finds one by what is in its coats.
 */
export async function listSchemes(ctx: Ctx, query: SchemeQuery, after: SchemesAfter | null): Promise<SchemeRowView[]> {
  assertMayLookFor(ctx, query)
  return inTransaction<Ctx, SchemeRowView[]>(ctx, async (tx) => {
    const isRecipe = may(tx.role, 'scheme:read')
    const page = { where: and((await answers(tx, query)).where, before(isRecipe ? schemes.savedAt : revisions.publishedAt, after)), limit: query.limit + 1 }
    return isRecipe ? recipes(tx, page) : looks(tx, page)
  })
}

/** These schemes as the acting person sees them, in the order of their ids as given. */
export async function schemeRows(tx: Ctx, ids: readonly string[]): Promise<SchemeRowView[]> {
  const page = { where: and(eq(schemes.workshopId, tx.workshopId), inArray(schemes.id, [...ids])), limit: ids.length }
  const rows: SchemeRowView[] = may(tx.role, 'scheme:read') ? await recipes(tx, page) : await looks(tx, page)
  const byId = new Map(rows.map(row => [row.id, row]))
  return ids.flatMap(id => byId.get(id) ?? [])
}

interface PageOf { where: SQL | undefined, limit: number }

async function recipes(tx: Ctx, { where, limit }: PageOf): Promise<SchemeListItem[]> {
  const rows = await tx.db.select({
    id: schemes.id, name: schemes.name, fish: schemes.fish, blankId: blanks.id, blankName: blanks.name, version: schemes.version, retired: schemes.retired,
    coats: coatCount, masks: maskCount, headNumber: schemes.headNumber, headId: revisions.id, publishedAt: revisions.publishedAt,
    savedAt: schemes.savedAt, savedById: schemes.savedBy, savedByName: persons.name,
  }).from(schemes)
    .innerJoin(blanks, eq(blanks.id, schemes.blankId))
    .leftJoin(revisions, head)
    .leftJoin(persons, eq(persons.id, schemes.savedBy))
    .where(where).orderBy(desc(schemes.savedAt), desc(schemes.id)).limit(limit)
  return rows.map(schemeListItem)
}

async function looks(tx: Ctx, { where, limit }: PageOf): Promise<SchemeLookView[]> {
  const rows = await tx.db.select({
    id: schemes.id, name: schemes.name, fish: schemes.fish, blankId: blanks.id, blankName: blanks.name, headId: revisions.id, publishedAt: revisions.publishedAt,
  }).from(schemes)
    .innerJoin(revisions, head)
    // The blank that was painted, which the draft may have left since.
    .innerJoin(blanks, sql`${blanks.id} = (${revisions.body} ->> 'blankId')::uuid`)
    .where(where).orderBy(desc(revisions.publishedAt), desc(schemes.id)).limit(limit)
  return rows.map(schemeLookView)
}

function before(at: typeof schemes.savedAt | typeof revisions.publishedAt, after: SchemesAfter | null): SQL | undefined {
  return after ? sql`(${at}, ${schemes.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)` : undefined
}
