import { and, eq, gt, isNull, lte, type SQL, sql } from 'drizzle-orm'
import { blanks, revisions, runs, schemePaints, schemes } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { assertMay } from '#server/services/people/assert-may'
import { may } from '#shared/people/may'
import type { SchemeStand, WallWish } from '#shared/scheme/wall/wall-wish'
import { answerWords } from './list-words'

/** Joins the newest revision of a scheme. */
export const head = and(eq(revisions.schemeId, schemes.id), eq(revisions.number, schemes.headNumber))

/** Refuses to look for what the acting person may not read. */
export function assertMayLookFor(ctx: Ctx, wish: WallWish): void {
  assertMay(ctx, 'scheme:look')
  if (wish.paintId || wish.personId || (wish.stands && wish.stands !== 'away')) assertMay(ctx, 'scheme:read')
  if (wish.stands === 'bench') assertMay(ctx, 'run:read')
}

/** What must be so of a scheme that answers a wish, and whether few schemes can: then they are all looked at instead of walked past. */
export interface Answers { where: SQL | undefined, isFew: boolean }

/**
 * What a wish comes to. Every comparison behind which rows of other workshops could be told is a plain equality, so that indexes serve
 * it from behind the wall; words go through the one door made for them.
 */
export async function answers(tx: Ctx, wish: WallWish): Promise<Answers> {
  const isRecipe = may(tx.role, 'scheme:read')
  const words = await answerWords(tx, wish.words)
  const where = and(
    eq(schemes.workshopId, tx.workshopId),
    wish.stands === 'away' ? eq(schemes.retired, true) : wish.retired === 'without' ? eq(schemes.retired, false) : undefined,
    wish.blankId ? eq(isRecipe ? schemes.blankId : blanks.id, wish.blankId) : undefined,
    wish.fish ? eq(schemes.fish, wish.fish) : undefined,
    wish.personId ? eq(schemes.savedBy, wish.personId) : undefined,
    wish.paintId ? usesPaint(tx, wish.paintId) : undefined,
    wish.stands ? standsAs(tx, wish.stands) : undefined,
    words.where,
  )
  return { where, isFew: words.isRare || wish.paintId !== undefined || wish.stands === 'away' || wish.stands === 'bench' }
}

function usesPaint(tx: Ctx, paintId: string): SQL {
  return sql`${schemes.id} in (select ${schemePaints.schemeId} from ${schemePaints} where ${and(eq(schemePaints.workshopId, tx.workshopId), eq(schemePaints.paintId, paintId))})`
}

function standsAs(tx: Ctx, stands: SchemeStand): SQL | undefined {
  switch (stands) {
    case 'draft': return eq(schemes.headNumber, 0)
    case 'ahead': return gt(schemes.savedAt, revisions.publishedAt)
    case 'published': return lte(schemes.savedAt, revisions.publishedAt)
    case 'bench': return sql`exists (select from ${runs} where ${and(eq(runs.schemeId, schemes.id), eq(runs.workshopId, tx.workshopId), isNull(runs.finishedAt))})`
    case 'away': return undefined
  }
}
