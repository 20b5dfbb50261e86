import { endEventStreams } from '#server/http/event-stream'
import { runHub } from '#server/services/bench/run-hub'
import { draftHub } from '#server/services/scheme/draft-hub'

/** Streams that would go on for hours are ended when the server is told to stop, so that it need not wait for them. */
export default defineNitroPlugin((nitro) => {
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, endEventStreams)
  nitro.hooks.hook('close', async () => {
    endEventStreams()
    await Promise.all([runHub().close(), draftHub().close()])
  })
})
