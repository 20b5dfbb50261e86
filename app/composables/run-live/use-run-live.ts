import { onBeforeUnmount, onMounted, readonly, ref, type Ref } from 'vue'
import { useEventListener } from '@vueuse/core'
import { createLiveLink, type LiveLink } from './live-link'
import type { RunEventsView } from '#shared/bench/run-view'

/** What one who follows gives and gets. */
export interface RunLiveAsk {
  runId: string
  /** The highest place in the order of arrival heard so far. */
  since: () => number
  /** What was done since, here and elsewhere; may tell something again that was asked for meanwhile. */
  onNews: (view: RunEventsView) => void
}

/**
 * Hears what others do in a run as they do it, while the page is seen. `isLive` is false while there is no line (no network, a
 * server that is too busy, a run that is over): then one asks every few seconds, as before. Called in the set-up of a page.
 */
export function useRunLive({ runId, since, onNews }: RunLiveAsk): { isLive: Readonly<Ref<boolean>> } {
  const isLive = ref(false)
  let link: LiveLink | null = null

  const listenWhileSeen = () => {
    if (document.visibilityState === 'hidden') link?.stop()
    else link?.start()
  }
  onMounted(() => {
    link = createLiveLink({
      open: place => new EventSource(`/api/runs/${runId}/live?since=${place}`),
      since,
      onNews,
      onLive: (is) => {
        isLive.value = is
      },
      later: (ms, run) => {
        const timer = window.setTimeout(run, ms)
        return () => window.clearTimeout(timer)
      },
    })
    listenWhileSeen()
  })
  onBeforeUnmount(() => link?.stop())
  if (import.meta.client) {
    useEventListener(document, 'visibilitychange', listenWhileSeen)
    useEventListener(window, 'online', () => link?.start())
    useEventListener(window, 'offline', () => link?.stop())
  }
  return { isLive: readonly(isLive) }
}
