import type { ActBox } from './device/act-box'
import type { KeptAct } from './device/bench-device'
import { EVENTS_MAX, type RunEvent, type RunEventAnswer } from '#shared/bench/run-event'

const RETRY_FIRST_MS = 2_000
const RETRY_LONGEST_MS = 30_000

/** Why acts did not arrive. */
export type Setback
  = | { kind: 'no network' }
    /** Nobody is signed in here any more. */
    | { kind: 'signed out', words: string }
    /** The server cannot read what it was handed: one of these acts stops the others. */
    | { kind: 'unreadable', words: string }
    /** It answers, and takes none of this run for now. */
    | { kind: 'refusing', words: string }

/** How the handing over stands. */
export interface HandOver {
  network: 'online' | 'none'
  /** Acts that are only on this tablet, of all runs. */
  waiting: number
  /** Why the server does not take them though it answers; null while it does. */
  because: string | null
  isSignedOut: boolean
}

/** What the keeper needs from the world. */
export interface ActKeeperPorts {
  /** Hands acts of one run over; throws when they do not arrive. */
  send: (runId: string, events: readonly RunEvent[]) => Promise<readonly RunEventAnswer[]>
  /** Tells what a hand-over threw. */
  setback: (error: unknown) => Setback
  /** The server has answered for these, and that is noted on the tablet. */
  onAnswers: (runId: string, answers: readonly RunEventAnswer[]) => void
  onChange: (state: HandOver) => void
  /** Runs something later; the answer calls it off. */
  later: (ms: number, run: () => void) => () => void
}

/** Hands acts over in the order they were done, from the tablet's box, and asks until the server has answered for each. */
export interface ActKeeper {
  /** Something new lies in the box. While a try is known to fail, the next one comes by itself. */
  added: () => Promise<void>
  /** Tries now: the network may be back, or somebody signed in again. */
  flush: () => Promise<void>
  /** Ends all trying; what is kept stays kept. */
  stop: () => void
}

const ONLINE: HandOver = { network: 'online', waiting: 0, because: null, isSignedOut: false }

/** A keeper over what this page and earlier ones put into the box. */
export function createActKeeper(box: ActBox, ports: ActKeeperPorts): ActKeeper {
  let state = ONLINE
  let sending: Promise<void> | null = null
  let callOff: (() => void) | null = null
  let retryMs = RETRY_FIRST_MS
  let stopped = false

  function say(change: Partial<HandOver>): void {
    state = { ...state, ...change }
    ports.onChange(state)
  }

  async function handOver(): Promise<void> {
    // Runs that take nothing for now hold up no other.
    const held = new Set<string>()
    let most = EVENTS_MAX
    let trouble: string | null = null
    while (!stopped) {
      const waiting = await box.waiting()
      const batch = nextBatch(waiting.filter(act => !held.has(act.runId)), most)
      const [first] = batch
      if (!first) {
        say({ waiting: waiting.length, because: trouble, ...trouble === null && waiting.length === 0 ? {} : { network: 'online' } })
        if (waiting.length > 0) tryLater()
        return
      }
      try {
        await take(first.runId, batch, await ports.send(first.runId, batch.map(act => act.event)))
        retryMs = RETRY_FIRST_MS
        most = EVENTS_MAX
        // Whoever answers is there: nothing is known of the network before.
        say({ network: 'online', waiting: waiting.length - batch.length, because: trouble, isSignedOut: false })
      }
      catch (error) {
        const setback = ports.setback(error)
        switch (setback.kind) {
          case 'no network':
          case 'signed out':
            say({ network: setback.kind === 'no network' ? 'none' : 'online', waiting: waiting.length, because: setback.kind === 'no network' ? null : setback.words, isSignedOut: setback.kind === 'signed out' })
            return tryLater()
          case 'unreadable':
            // Halved until the one that cannot be read stands alone and lies aside.
            if (batch.length > 1) most = Math.ceil(batch.length / 2)
            else await take(first.runId, batch, [{ id: first.id, taken: false, reason: setback.words }])
            break
          case 'refusing':
            held.add(first.runId)
            trouble = setback.words
        }
      }
    }
  }

  async function take(runId: string, batch: readonly KeptAct[], answers: readonly RunEventAnswer[]): Promise<void> {
    if (!answers.some(answer => batch.some(act => act.id === answer.id))) throw new Error('The server answered for none of these.')
    await box.settle(answers)
    ports.onAnswers(runId, answers)
  }

  function tryLater(): void {
    if (stopped) return
    callOff?.()
    callOff = ports.later(retryMs, () => void flush())
    retryMs = Math.min(RETRY_LONGEST_MS, retryMs * 2)
  }

  async function flush(): Promise<void> {
    callOff?.()
    callOff = null
    sending ??= handOver().catch(() => tryLater()).finally(() => {
      sending = null
    })
    return sending
  }

  return {
    async added() {
      const waiting = (await box.waiting()).length
      say({ waiting })
      if (sending) await sending
      if (callOff === null) await flush()
    },
    flush,
    stop() {
      stopped = true
      callOff?.()
      callOff = null
    },
  }
}

/** The oldest acts that go together: of one run, in order, no more than so many. */
function nextBatch(waiting: readonly KeptAct[], most: number): KeptAct[] {
  return waiting.filter(act => act.runId === waiting[0]?.runId).slice(0, most)
}
