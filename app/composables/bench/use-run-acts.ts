import { computed, type ComputedRef, onBeforeUnmount, onMounted, ref, type Ref, shallowRef } from 'vue'
import { sendActs, setbackOf } from './bench-link'
import { useActsHeard } from './use-acts-heard'
import { useBenchClock } from './use-bench-clock'
import type { RunHere } from './use-run-here'
import { type ActKeeper, createActKeeper, type HandOver } from '~/bench/act-keeper'
import { actBox } from '~/bench/device/act-box'
import { benchDevice, type KeptAct } from '~/bench/device/bench-device'
import { newActs } from '~/bench/new-acts'
import { moveOldActs } from '~/bench/old-acts'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import { standingActs } from '#shared/bench/run-state'

/** What was done in a run, here and elsewhere. */
export interface RunActs {
  /** The server's acts in the order of arrival, then those that are only here. */
  events: ComputedRef<readonly RunEvent[]>
  handOver: Readonly<Ref<HandOver>>
  /** Acts of this run that the server refused: they lie aside until somebody has read why. */
  refused: ComputedRef<readonly KeptAct[]>
  /** Lets go of refused acts that were read. */
  read: (acts: readonly KeptAct[]) => Promise<void>
  /** Number of the scheme's newest revision, as far as is known. */
  headNumber: Readonly<Ref<number>>
  /** Why the tablet keeps nothing; null while it does. */
  keepsNothing: Readonly<Ref<string | null>>
  /** Does acts: they count when they are kept on the tablet, and are handed over when they can be. False when they could not be kept. */
  do: (...acts: RunAct[]) => Promise<boolean>
  /** The last thing one did oneself that still stands; undefined when there is nothing to take back. */
  last: ComputedRef<RunEvent | undefined>
}

/** Tells other pages of this tablet that something was done here. */
const CHANNEL = 'countershade-acts'
/** One page of a tablet hands over at a time; the other would only say the same again. */
const LOCK = 'countershade-hand-over'

/** Keeps, hands over and hears of the acts of a run. Called in the set-up of the page that follows it. */
export function useRunActs({ run, owner, shelf }: RunHere): RunActs {
  const clock = useBenchClock()
  const box = actBox(benchDevice, owner)
  const own = shallowRef<readonly KeptAct[]>([])
  const handOver = ref<HandOver>({ network: 'online', waiting: 0, because: null, isSignedOut: false })
  const keepsNothing = ref<string | null>(null)
  const channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(CHANNEL)
  /** Acts are kept one press after the other. */
  let keeping: Promise<unknown> = Promise.resolve()

  const { heard, headNumber, listen } = useActsHeard(run, shelf, {
    // What the notebook shows need not lie here any more.
    onHeard: async (ids) => {
      await box.drop(ids).catch(() => undefined)
      await look()
    },
    network: (is) => {
      const wasGone = handOver.value.network === 'none'
      if (is === 'none') handOver.value = { ...handOver.value, network: 'none' }
      else if (wasGone || handOver.value.waiting > 0) void keeper.flush()
      if (is === 'online' && wasGone) handOver.value = { ...handOver.value, network: 'online' }
    },
  })
  const events = computed(() => {
    const known = new Set(heard.value.map(event => event.id))
    return [...heard.value, ...own.value.filter(act => act.stand !== 'refused' && !known.has(act.id)).map(act => act.event)]
  })

  const keeper: ActKeeper = createActKeeper(box, {
    send: (runId, batch) => alone(() => sendActs(runId, batch, clock.read())),
    setback: setbackOf,
    onAnswers: () => {
      channel?.postMessage(run.id)
      void look().then(listen)
    },
    onChange: (state) => {
      handOver.value = state
    },
    later: (ms, work) => {
      const timer = window.setTimeout(work, ms)
      return () => window.clearTimeout(timer)
    },
  })

  async function look(): Promise<void> {
    own.value = await box.ofRun(run.id)
  }

  async function keep(acts: readonly RunAct[]): Promise<boolean> {
    let done: RunEvent[]
    try {
      done = newActs(acts, events.value, clock.read())
      await box.keep(run.id, done)
    }
    catch (error) {
      keepsNothing.value = keepsNothingWords(error)
      return false
    }
    keepsNothing.value = null
    own.value = [...own.value, ...done.map(event => ({ ...owner, id: event.id, runId: run.id, event, stand: 'waiting' as const, reason: '' }))]
    channel?.postMessage(run.id)
    void keeper.added()
    return true
  }

  onMounted(async () => {
    if (channel) channel.onmessage = () => void look()
    try {
      await moveOldActs(window.localStorage, owner.personId, box)
      // A run read anew from the server may show already what this tablet had not heard of.
      await box.drop(heard.value.map(event => event.id))
      await look()
    }
    catch (error) {
      keepsNothing.value = keepsNothingWords(error)
    }
    // The server's time comes first: by it one sees how wrong this tablet's clock is.
    await listen()
    await keeper.flush()
  })
  onBeforeUnmount(() => {
    keeper.stop()
    channel?.close()
  })

  return {
    events, handOver, headNumber, keepsNothing,
    refused: computed(() => own.value.filter(act => act.stand === 'refused')),
    async read(acts) {
      await box.drop(acts.map(act => act.id))
      await look()
    },
    do(...acts) {
      const kept = keeping.then(() => keep(acts))
      keeping = kept
      return kept
    },
    last: computed(() => {
      const mine = new Set([...heard.value.filter(event => event.by?.id === owner.personId), ...own.value].map(event => event.id))
      return standingActs(events.value).findLast(event => mine.has(event.id))
    }),
  }
}

/** Runs one hand-over of this tablet at a time, where the browser can. */
function alone<T>(work: () => Promise<T>): Promise<T> {
  return 'locks' in navigator ? navigator.locks.request(LOCK, work) : work()
}

function keepsNothingWords(error: unknown): string {
  const isFull = error instanceof DOMException && error.name === 'QuotaExceededError'
  return isFull
    ? 'The storage of this tablet is full: what was pressed last is not kept and does not count. Make room on the tablet, then press again.'
    : 'This tablet keeps nothing: what was pressed last is not kept and does not count. A private window or a strict setting of the browser may be why.'
}
