import { ref, type Ref, shallowRef, type ShallowRef } from 'vue'
import { useEventListener, useIntervalFn } from '@vueuse/core'
import { fetchActs } from './bench-link'
import { useBenchClock } from './use-bench-clock'
import { useRunLive } from '~/composables/run-live/use-run-live'
import type { RunShelf } from '~/bench/device/run-shelf'
import { problemOf } from '~/errors/problem-of'
import type { RunEventsView, RunEventView, RunView } from '#shared/bench/run-view'

/** How often one asks what others did meanwhile: while the server tells by itself, and while it does not, ms. */
const ASK_MS = { told: 20_000, untold: 4_000 }

/** What the notebook shows of a run. */
export interface ActsHeard {
  heard: ShallowRef<readonly RunEventView[]>
  headNumber: Ref<number>
  /** Asks now. */
  listen: () => Promise<void>
}

/** Hears what is done in a run, here and elsewhere, as it is done; keeps it on the tablet, and notices the network coming and going. */
export function useActsHeard(run: RunView, shelf: RunShelf, { onHeard, network }: {
  onHeard: (ids: readonly string[]) => Promise<void>
  network: (is: 'online' | 'none') => void
}): ActsHeard {
  const clock = useBenchClock()
  const heard = shallowRef<readonly RunEventView[]>(run.events)
  const headNumber = ref(run.headNumber)
  const since = () => heard.value.at(-1)?.seq ?? 0
  let askedAt = 0

  async function take(view: RunEventsView): Promise<void> {
    headNumber.value = view.headNumber
    // Another answer may have come first.
    const fresh = view.events.filter(event => event.seq > since())
    if (fresh.length === 0) return
    heard.value = [...heard.value, ...fresh]
    try {
      await shelf.hear(run.id, { events: fresh, headNumber: view.headNumber })
    }
    catch {
      // A tablet that keeps nothing of what it hears keeps its own acts: without either it would not know its place after a restart.
      return
    }
    await onHeard(fresh.map(event => event.id))
  }

  async function listen(): Promise<void> {
    if (document.visibilityState === 'hidden') return
    askedAt = performance.now()
    const asked = Date.now()
    try {
      const view = await fetchActs(run.id, since())
      clock.heard(view.now, asked, Date.now())
      await take(view)
      network('online')
    }
    catch (error) {
      if (problemOf(error) === null) network('none')
    }
  }

  const { isLive } = useRunLive({ runId: run.id, since, onNews: view => void take(view) })
  useIntervalFn(() => {
    if (performance.now() - askedAt >= (isLive.value ? ASK_MS.told : ASK_MS.untold)) void listen()
  }, 1_000)
  useEventListener(window, 'online', () => void listen())
  useEventListener(window, 'offline', () => network('none'))
  useEventListener(document, 'visibilitychange', () => void listen())
  return { heard, headNumber, listen }
}
