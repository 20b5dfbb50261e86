import type { FindAnswer, FindAsk } from '#shared/scheme/find/find-messages'

/** A thread that looks for coats, for as long as a sheet is open. */
export interface FindThread {
  ask: (ask: FindAsk) => void
  end: () => void
}

/** Starts a find thread. Only in a browser. `hear` also hears of a thread that died or never loaded: as a failed request of any number. */
export function startFindThread(hear: (answer: FindAnswer) => void): FindThread {
  const worker = new Worker(new URL('../../workers/find.worker.ts', import.meta.url), { type: 'module', name: 'find a coat' })
  worker.addEventListener('message', (event: MessageEvent<FindAnswer>) => hear(event.data))
  worker.addEventListener('error', (event) => {
    event.preventDefault()
    hear({ answer: 'failed', request: Infinity, reason: event.message || 'the find thread stopped' })
  })
  return {
    // Reactive objects cannot be handed over; what a question holds is plain data.
    ask: ask => worker.postMessage(JSON.parse(JSON.stringify(ask))),
    end: () => worker.terminate(),
  }
}
