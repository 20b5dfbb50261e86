import { and, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { createAlarm } from '#server/services/live/alarm'
import { stillHere } from '#server/services/live/still-here'
import { assertMay } from '#server/services/people/assert-may'
import { memberships, persons } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import { sameValue } from '#shared/scheme/canonical'
import { type DraftLiveView, GONE_AFTER_MS } from '#shared/scheme/presence'
import { beGone, draftVersion } from './be-here'
import type { DraftHub } from './draft-hub'
import { type DraftNews, readDraftNews } from './draft-news'

/** How often one who has a draft open hears something though nothing happened, ms: whoever is gone without a word is seen by then. */
const BEAT_MS = 10_000
/** Tabs of one draft that are shown at most. */
const SHOWN_MAX = 12

/** Somebody who has a draft open. */
export interface DraftFollower {
  /** Its version and who else is here: the first time always, later when either changed. */
  hear: (view: DraftLiveView) => void
  /** Nothing changed. */
  beat: () => void
  /** They are gone. */
  signal: AbortSignal
}

/** Who has a draft open, as their word comes in. */
type Here = Map<string, { personId: string, coatId: string | null, at: number }>

function note(here: Here, news: DraftNews, at: number): void {
  switch (news.is) {
    case 'here':
      // Each word counts anew; a tab that is full of others takes no more in.
      if (here.has(news.tab) || here.size < SHOWN_MAX) here.set(news.tab, { personId: news.personId, coatId: news.coatId, at })
      return
    case 'gone':
      if (here.get(news.tab)?.personId === news.personId) here.delete(news.tab)
      return
    case 'saved':
      return
  }
}

/**
 * Tells somebody which version of a draft the server has and who else has it open, as that changes on whichever process, until
 * they hang up or may no longer read it; then the others hear that they are gone. Who they are is looked up anew each time.
 */
export async function followDraft(
  ctx: Ctx, schemeId: string, tab: string, follower: DraftFollower, hub: DraftHub, times = { beatMs: BEAT_MS, goneAfterMs: GONE_AFTER_MS },
): Promise<'hung up' | 'no longer here'> {
  assertMay(ctx, 'scheme:read')
  const { signal } = follower
  const here: Here = new Map()
  const alarm = createAlarm(signal)
  const stop = hub.listen(ctx.personId, schemeId, (payload) => {
    const news = payload === null ? null : readDraftNews(payload)
    if (news && news.workshopId === ctx.workshopId) note(here, news, Date.now())
    alarm.ring()
  })
  try {
    let last: DraftLiveView | null = null
    while (!signal.aborted) {
      for (const [other, { at }] of here) if (Date.now() - at > times.goneAfterMs) here.delete(other)
      const now = await stillHere(ctx, 'scheme:read')
      const view = now && await readLive(now, schemeId, tab, here)
      if (!view) return 'no longer here'
      if (signal.aborted) break
      if (last && sameValue(last, view)) follower.beat()
      else follower.hear(view)
      last = view
      await alarm.sleep(times.beatMs)
    }
    return 'hung up'
  }
  finally {
    stop()
    await beGone(ctx, schemeId, tab)
  }
}

async function readLive(ctx: Ctx, schemeId: string, tab: string, here: Here): Promise<DraftLiveView | null> {
  const others = [...here].filter(([other]) => other !== tab).sort(([a], [b]) => a < b ? -1 : 1)
  try {
    return await inTransaction(ctx, async (tx) => {
      const version = await draftVersion(tx, schemeId)
      const names = await namesOf(tx, others.map(([, { personId }]) => personId))
      return {
        version,
        others: others.flatMap(([other, { personId, coatId }]) => {
          const name = names.get(personId)
          return name === undefined ? [] : [{ tab: other, person: { id: personId, name }, coatId }]
        }),
      }
    })
  }
  catch (error) {
    if (error instanceof Problem && error.data.code === 'scheme/not-found') return null
    throw error
  }
}

/** Names of those who are in the workshop now. */
async function namesOf(tx: Ctx, personIds: readonly string[]): Promise<Map<string, string>> {
  if (personIds.length === 0) return new Map()
  const rows = await tx.db.select({ id: persons.id, name: persons.name }).from(persons)
    .innerJoin(memberships, and(eq(memberships.personId, persons.id), eq(memberships.workshopId, tx.workshopId)))
    .where(inArray(persons.id, [...personIds]))
  return new Map(rows.map(({ id, name }) => [id, name]))
}
