import { and, desc, eq, or, type SQL, sql } from 'drizzle-orm'
import { z } from 'zod'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { blanks, persons, revisions, schemes } from '#server/db/tables'
import { may } from '#shared/people/may'
import type { SchemeQuery } from '#shared/scheme/scheme-input'
import type { SchemeListItem, SchemeLookView, SchemeRowView } from '#shared/scheme/scheme-view'
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
/** Keys travel as whole milliseconds, so rows are compared and ordered by them. */
const workedAt = sql`date_trunc('milliseconds', ${schemes.savedAt})`
const publishedAt = sql`date_trunc('milliseconds', ${revisions.publishedAt})`

const head = and(eq(revisions.schemeId, schemes.id), eq(revisions.number, schemes.headNumber))

/**
 * The schemes of the workshop that answer a search, newest work first, one row more than asked for when there are more.
 * Who may not read recipes gets the published ones, as looks, and never finds one by what is in its coats.
 */
export async function listSchemes(ctx: Ctx, query: SchemeQuery, after: SchemesAfter | null): Promise<SchemeRowView[]> {
  assertMay(ctx, 'scheme:look')
  if (query.paintId) assertMay(ctx, 'scheme:read')
  return inTransaction<Ctx, SchemeRowView[]>(ctx, tx => may(tx.role, 'scheme:read') ? recipes(tx, query, after) : looks(tx, query, after))
}

async function recipes(tx: Ctx, query: SchemeQuery, after: SchemesAfter | null): Promise<SchemeListItem[]> {
  const rows = await tx.db.select({
    id: schemes.id, name: schemes.name, fish: schemes.fish, blankId: blanks.id, blankName: blanks.name, version: schemes.version,
    coats: coatCount, masks: maskCount, headNumber: schemes.headNumber, headId: revisions.id, publishedAt: revisions.publishedAt,
    savedAt: schemes.savedAt, savedById: schemes.savedBy, savedByName: persons.name,
  }).from(schemes)
    .innerJoin(blanks, eq(blanks.id, schemes.blankId))
    .leftJoin(revisions, head)
    .leftJoin(persons, eq(persons.id, schemes.savedBy))
    .where(and(common(tx, query), ...wordsOf(query).map(word => or(inNames(word), inCoats(word))), usesPaint(query), before(workedAt, after)))
    .orderBy(desc(workedAt), desc(schemes.id)).limit(query.limit + 1)
  return rows.map(schemeListItem)
}

async function looks(tx: Ctx, query: SchemeQuery, after: SchemesAfter | null): Promise<SchemeLookView[]> {
  const rows = await tx.db.select({
    id: schemes.id, name: schemes.name, fish: schemes.fish, blankId: blanks.id, blankName: blanks.name, headId: revisions.id, publishedAt: revisions.publishedAt,
  }).from(schemes)
    .innerJoin(revisions, head)
    // The blank that was painted, which the draft may have left since.
    .innerJoin(blanks, sql`${blanks.id} = (${revisions.body} ->> 'blankId')::uuid`)
    .where(and(common(tx, query), ...wordsOf(query).map(inNames), before(publishedAt, after)))
    .orderBy(desc(publishedAt), desc(schemes.id)).limit(query.limit + 1)
  return rows.map(schemeLookView)
}

function common(tx: Ctx, query: SchemeQuery): SQL | undefined {
  return and(
    eq(schemes.workshopId, tx.workshopId),
    query.retired === 'without' ? eq(schemes.retired, false) : undefined,
    query.blankId ? eq(blanks.id, query.blankId) : undefined,
  )
}

function wordsOf(query: SchemeQuery): string[] {
  return query.words.split(/\s+/).filter(word => word !== '').map(word => `%${word.replace(/[\\%_]/g, '\\$&')}%`)
}

function inNames(word: string): SQL {
  return sql`(${schemes.name} ilike ${word} or ${schemes.fish} ilike ${word} or ${blanks.name} ilike ${word})`
}

function inCoats(word: string): SQL {
  return sql`exists (select from jsonb_path_query(${schemes.draft}, '$.stack[*].coat.name') as found(name) where found.name #>> '{}' ilike ${word})`
}

function usesPaint(query: SchemeQuery): SQL | undefined {
  if (!query.paintId) return undefined
  return sql`jsonb_path_exists(${schemes.draft}, '$.stack[*].coat.mix.parts[*] ? (@.paintId == $id)', jsonb_build_object('id', ${query.paintId}::text))`
}

function before(at: SQL, after: SchemesAfter | null): SQL | undefined {
  return after ? sql`(${at}, ${schemes.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)` : undefined
}
