import type { Ctx } from '#server/services/ctx'
import { createAlarm } from '#server/services/live/alarm'
import { stillHere } from '#server/services/live/still-here'
import { assertMay } from '#server/services/people/assert-may'
import { Problem } from '#shared/errors/problem'
import type { RunEventsView } from '#shared/bench/run-view'
import { getRunEvents } from './get-run'
import type { RunHub } from './run-hub'

/** How often one who follows hears something though nothing happened, ms: it keeps the way open, and whoever lost their place is seen. */
export const BEAT_MS = 15_000

/** Somebody who follows a run. */
export interface RunFollower {
  /** What was done since they last heard; the first time always, later only when there is something. */
  hear: (view: RunEventsView) => void
  /** Nothing was. */
  beat: () => void
  /** They are gone. */
  signal: AbortSignal
}

/** Why following ended. */
export type FollowEnd = 'finished' | 'no longer here' | 'hung up'

/**
 * Tells somebody what is done in a run from after a place in the order of arrival, as it arrives on whichever process, until
 * the run is finished, they hang up, or their session, their place in the workshop or their role's right to it has ended.
 * Who they are is looked up anew before each thing they are told.
 */
export async function followRun(ctx: Ctx, runId: string, since: number, follower: RunFollower, hub: RunHub, beatMs = BEAT_MS): Promise<FollowEnd> {
  assertMay(ctx, 'run:read')
  const { signal } = follower
  const alarm = createAlarm(signal)
  const stop = hub.listen(ctx.personId, runId, alarm.ring)
  try {
    let [place, head, isFirst] = [since, 0, true]
    while (!signal.aborted) {
      const now = await stillHere(ctx, 'run:read')
      if (!now) return 'no longer here'
      const view = await readSince(now, runId, place)
      if (!view) return 'no longer here'
      if (signal.aborted) break
      if (isFirst || view.events.length > 0 || view.headNumber !== head || view.finishedAt !== null) follower.hear(view)
      else follower.beat()
      place = view.events.at(-1)?.seq ?? place
      head = view.headNumber
      isFirst = false
      if (view.finishedAt !== null) return 'finished'
      await alarm.sleep(beatMs)
    }
    return 'hung up'
  }
  finally {
    stop()
  }
}

async function readSince(ctx: Ctx, runId: string, since: number): Promise<RunEventsView | null> {
  try {
    return await getRunEvents(ctx, runId, since)
  }
  catch (error) {
    if (error instanceof Problem && error.data.code === 'run/not-found') return null
    throw error
  }
}
