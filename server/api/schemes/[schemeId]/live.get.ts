import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { openEventStream } from '#server/http/event-stream'
import { parseParams, parseQuery } from '#server/http/parse'
import { draftHub } from '#server/services/scheme/draft-hub'
import { followDraft } from '#server/services/scheme/follow-draft'
import { draftVersion } from '#server/services/scheme/be-here'
import { inTransaction } from '#server/services/in-transaction'
import { FollowQuery } from '#shared/scheme/presence'
import { SchemeParams } from '#shared/scheme/scheme-input'

/**
 * A draft while one has it open: events named `draft`, each with its version and who else has it open, when either changes;
 * then `over` when this person may no longer read it. Whoever hangs up is gone for the others at once.
 */
export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  const { tab } = parseQuery(event, FollowQuery)
  // What is refused is refused as any request is, before the stream begins.
  await inTransaction(ctx, tx => draftVersion(tx, schemeId))
  const hub = draftHub()
  hub.assertRoom(ctx.personId)

  const stream = openEventStream(event)
  let version = 0
  try {
    const end = await followDraft(ctx, schemeId, tab, {
      hear(view) {
        version = view.version
        stream.send('draft', version, view)
      },
      beat: stream.beat,
      signal: stream.signal,
    }, hub)
    if (end !== 'hung up') stream.send('over', version, { because: end })
  }
  catch (error) {
    // The answer has begun: the reader comes back and asks again.
    console.error(`Following the draft of scheme ${schemeId} broke off:`, error)
  }
  finally {
    stream.end()
  }
})
