import { onBeforeUnmount, onMounted, readonly, type Ref, shallowRef, watch } from 'vue'
import { useEventListener } from '@vueuse/core'
import { createDraftPresence, type DraftPresence } from './draft-presence'
import { thisTab } from './draft-tab'
import type { OtherHere } from '#shared/scheme/presence'

/** What being present needs to know of the page. */
export interface PresenceAsk {
  schemeId: string
  /** The coat in hand. */
  coatId: Readonly<Ref<string | null>>
  /** The server has this version of the draft. */
  onVersion: (version: number) => void
}

/** Shows this page to others who have the draft open, and them to it, while it is in sight. Called in the set-up of a component. */
export function useDraftPresence({ schemeId, coatId, onVersion }: PresenceAsk): { others: Readonly<Ref<readonly OtherHere[]>> } {
  const others = shallowRef<readonly OtherHere[]>([])
  let presence: DraftPresence | null = null
  let isLeft = false

  const whileSeen = () => {
    if (document.visibilityState === 'hidden') presence?.stop()
    else presence?.start()
  }
  onMounted(async () => {
    const { name: tab } = await thisTab()
    if (isLeft) return
    presence = createDraftPresence({
      open: () => new EventSource(`/api/schemes/${schemeId}/live?tab=${tab}`),
      say: (coat) => {
        // The next word comes soon: one that is lost is not missed.
        $fetch(`/api/schemes/${schemeId}/here`, { method: 'POST', body: { tab, coatId: coat } }).catch(() => undefined)
      },
      coatId: () => coatId.value,
      onOthers: (now) => {
        others.value = now
      },
      onVersion,
      later: (ms, run) => {
        const timer = window.setTimeout(run, ms)
        return () => window.clearTimeout(timer)
      },
    })
    whileSeen()
  })
  onBeforeUnmount(() => {
    isLeft = true
    presence?.stop()
  })
  watch(coatId, () => presence?.coatChanged())
  if (import.meta.client) {
    useEventListener(document, 'visibilitychange', whileSeen)
    useEventListener(window, 'online', () => presence?.start())
    useEventListener(window, 'offline', () => presence?.stop())
  }
  return { others: readonly(others) }
}
