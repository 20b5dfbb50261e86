import type { TurnAnswer, TurnAsk } from '#shared/picture/turn/turn-messages'

/** The thread that lays looks on sheets for one turning view. */
export interface TurnThread {
  ask: (ask: TurnAsk) => void
  /** Ends it; nothing is heard any more, and all it held is free. */
  end: () => void
}

/** Starts a thread. Only in a browser. */
export function turnThread(hear: (answer: TurnAnswer) => void): TurnThread {
  const worker = new Worker(new URL('../../workers/turn.worker.ts', import.meta.url), { type: 'module', name: 'turn' })
  worker.addEventListener('message', (event: MessageEvent<TurnAnswer>) => hear(event.data))
  worker.addEventListener('error', event => hear({ answer: 'failed', request: Infinity, reason: event.message || 'the thread stopped' }))
  return {
    // Reactive objects cannot be handed over; what a request holds is plain data.
    ask: ask => worker.postMessage(JSON.parse(JSON.stringify(ask))),
    end: () => worker.terminate(),
  }
}
