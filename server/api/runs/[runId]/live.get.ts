import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { lastEventId, openEventStream } from '#server/http/event-stream'
import { parseParams, parseQuery } from '#server/http/parse'
import { followRun } from '#server/services/bench/follow-run'
import { getRunEvents } from '#server/services/bench/get-run'
import { runHub } from '#server/services/bench/run-hub'
import { EventsQuery, RunParams } from '#shared/bench/run-view'

/**
 * What is done in a run, as it arrives: events named `acts`, each with what `events` answers, under the place of its last act
 * as id; then `over` when the run is finished or this person may no longer follow it. A reader that comes back goes on where it was.
 */
export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:read')
  const { runId } = parseParams(event, RunParams)
  const { since } = parseQuery(event, EventsQuery)
  let place = lastEventId(event) ?? since
  // What is refused is refused as any request is, before the stream begins.
  await getRunEvents(ctx, runId, place)
  const hub = runHub()
  hub.assertRoom(ctx.personId)

  const stream = openEventStream(event)
  try {
    const end = await followRun(ctx, runId, place, {
      hear(view) {
        place = view.events.at(-1)?.seq ?? place
        stream.send('acts', place, view)
      },
      beat: stream.beat,
      signal: stream.signal,
    }, hub)
    if (end !== 'hung up') stream.send('over', place, { because: end })
  }
  catch (error) {
    // The answer has begun: the reader comes back and asks again.
    console.error(`Following run ${runId} broke off:`, error)
  }
  finally {
    stream.end()
  }
})
