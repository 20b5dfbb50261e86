import { sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { z } from 'zod'

/** The channel of the database on which processes tell each other who has a draft open and that it was saved. */
export const DRAFT_CHANNEL = 'countershade_draft'

const Of = z.object({ workshopId: z.uuid(), schemeId: z.uuid() })

/** What is told: ids only, never a name or anything of a recipe, so that it may go to every process. */
export const DraftNews = z.discriminatedUnion('is', [
  Of.extend({ is: z.literal('here'), personId: z.uuid(), tab: z.uuid(), coatId: z.uuid().nullable() }),
  Of.extend({ is: z.literal('gone'), personId: z.uuid(), tab: z.uuid() }),
  Of.extend({ is: z.literal('saved') }),
])
export type DraftNews = z.output<typeof DraftNews>

/** Reads what was told; null for what is not of this channel's form. */
export function readDraftNews(payload: string): DraftNews | null {
  try {
    return DraftNews.safeParse(JSON.parse(payload)).data ?? null
  }
  catch {
    return null
  }
}

/** Tells it to every process once the transaction has gone through. */
export async function tellDraftNews(tx: Ctx, news: DraftNews): Promise<void> {
  await tx.db.execute(sql`select pg_notify(${DRAFT_CHANNEL}, ${JSON.stringify(news)})`)
}
