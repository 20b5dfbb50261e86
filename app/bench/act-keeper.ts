import { EVENTS_MAX, type RunEvent, type RunEventAnswer } from '#shared/bench/run-event'

const RETRY_FIRST_MS = 2_000
const RETRY_LONGEST_MS = 30_000

/** How the handing over stands. */
export interface HandOver {
  network: 'online' | 'none'
  /** Acts that are only on this tablet. */
  kept: number
  /** Why the server does not take them though it answers; null while it does. */
  because: string | null
}

/** What the keeper needs from the world. */
export interface ActKeeperPorts {
  /** Hands acts over; throws when they do not arrive. */
  send: (events: readonly RunEvent[]) => Promise<readonly RunEventAnswer[]>
  /** Says why a hand-over threw: null for no network, else the server's reason. */
  reason: (error: unknown) => string | null
  /** Writes an act where it survives a sudden end. */
  keep: (event: RunEvent) => void
  /** Drops what was kept. */
  forget: (eventId: string) => void
  /** The server has answered for these. */
  onAnswers: (answers: readonly RunEventAnswer[]) => void
  onChange: (state: HandOver) => void
  /** Runs something later; the answer calls it off. */
  later: (ms: number, run: () => void) => () => void
}

/** Hands acts over in the order they were done, and keeps them until the server has answered for each. */
export interface ActKeeper {
  /** Something was done. It is kept first, then handed over. */
  add: (event: RunEvent) => void
  /** Tries now: the network may be back. */
  flush: () => Promise<void>
  /** Ends all trying; what is kept stays kept. */
  stop: () => void
}

/** A keeper that starts with what an earlier page of this tablet left behind. */
export function createActKeeper(left: readonly RunEvent[], ports: ActKeeperPorts): ActKeeper {
  const waiting = [...left]
  let state: HandOver = { network: 'online', kept: waiting.length, because: null }
  let sending: Promise<void> | null = null
  let callOff: (() => void) | null = null
  let retryMs = RETRY_FIRST_MS
  let stopped = false

  function say(change: Partial<HandOver>): void {
    state = { ...state, ...change, kept: waiting.length }
    ports.onChange(state)
  }

  function take(answers: readonly RunEventAnswer[]): void {
    const answered = new Set(answers.map(answer => answer.id))
    for (const id of answered) ports.forget(id)
    waiting.splice(0, waiting.length, ...waiting.filter(event => !answered.has(event.id)))
    ports.onAnswers(answers)
  }

  async function handOver(): Promise<void> {
    while (waiting.length > 0 && !stopped) {
      const batch = waiting.slice(0, EVENTS_MAX)
      try {
        take(await ports.send(batch))
        retryMs = RETRY_FIRST_MS
        say({ network: 'online', because: null })
      }
      catch (error) {
        const because = ports.reason(error)
        say({ network: because === null ? 'none' : 'online', because })
        tryLater()
        return
      }
    }
  }

  function tryLater(): void {
    if (stopped) return
    callOff = ports.later(retryMs, () => void flush())
    retryMs = Math.min(RETRY_LONGEST_MS, retryMs * 2)
  }

  function flush(): Promise<void> {
    callOff?.()
    callOff = null
    sending ??= handOver().finally(() => {
      sending = null
    })
    return sending
  }

  if (waiting.length > 0) say({})
  return {
    add(event) {
      ports.keep(event)
      waiting.push(event)
      say({})
      // While a try is known to fail, the next one comes by itself.
      if (callOff === null) void flush()
    },
    flush,
    stop() {
      stopped = true
      callOff?.()
      callOff = null
    },
  }
}
