import { and, eq, inArray, or, type SQL, sql } from 'drizzle-orm'
import { blanks, schemes, schemeWords } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { may } from '#shared/people/may'

/** A word that so many schemes have at most is rare: they are looked up, and nothing else is read. */
const RARE = 2000

/** Shorter words hold no three letters in a row for the index to go by. */
const INDEXED = 3

/** What words come to: a condition, and whether few schemes meet it. */
export interface WordsAsked { where: SQL | undefined, isRare: boolean }

/**
 * All of these words in the name, the fish or the blank, for those who read recipes also in the coats; in any case, as they are written.
 * Rare words are answered by an index of letters; of common ones the first page is soon full, so that each row is looked at as it comes.
 */
export async function answerWords(tx: Ctx, words: string): Promise<WordsAsked> {
  const isRecipe = may(tx.role, 'scheme:read')
  const asked = await Promise.all(words.split(/\s+/).filter(word => word !== '').map(async (word) => {
    const like = `%${word.replace(/[\\%_]/g, '\\$&')}%`
    // The blank that was painted may not be the draft's, so for looks every row is judged by what it shows.
    const ids = isRecipe && word.length >= INDEXED ? await schemesWith(tx, like) : null
    return ids ? { where: inArray(schemes.id, ids), isRare: true } : { where: rowHas(tx, like, isRecipe), isRare: false }
  }))
  return { where: and(...asked.map(({ where }) => where)), isRare: asked.some(({ isRare }) => isRare) }
}

/** Ids of the schemes that have a word, or null when they are many. */
async function schemesWith(tx: Ctx, like: string): Promise<string[] | null> {
  const { rows } = await tx.db.execute<{ id: string }>(sql`select schemes_worded(${like}, true) as id limit ${RARE + 1}`)
  return rows.length > RARE ? null : rows.map(({ id }) => id)
}

function rowHas(tx: Ctx, like: string, withCoats: boolean): SQL | undefined {
  const inWords = withCoats ? sql`(${schemeWords.names} ilike ${like} or ${schemeWords.coats} ilike ${like})` : sql`${schemeWords.names} ilike ${like}`
  return or(
    sql`exists (select from ${schemeWords} where ${and(eq(schemeWords.schemeId, schemes.id), eq(schemeWords.workshopId, tx.workshopId), inWords)})`,
    withCoats
      ? sql`${schemes.blankId} in (select ${blanks.id} from ${blanks} where ${blanks.workshopId} = ${tx.workshopId} and ${blanks.name} ilike ${like})`
      : sql`${blanks.name} ilike ${like}`,
  )
}
