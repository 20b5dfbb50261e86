import { type Ref, ref } from 'vue'
import { useEventListener } from '@vueuse/core'

/** Asks before a page with something unsaved is left. */
export interface LeaveGuard {
  /** Somebody is about to leave. */
  isAsking: Ref<boolean>
  /** Leaves all the same. */
  leave: () => Promise<void>
}

/** Stops whoever leaves while `isUnsaved` says so, until they say it again. */
export function useLeaveGuard(isUnsaved: () => boolean): LeaveGuard {
  const isAsking = ref(false)
  let way: string | null = null
  let mayGo = false

  onBeforeRouteLeave((to) => {
    if (mayGo || !isUnsaved()) return
    way = to.fullPath
    isAsking.value = true
    return false
  })
  if (import.meta.client) {
    useEventListener(window, 'beforeunload', (event) => {
      if (isUnsaved()) event.preventDefault()
    })
  }
  return {
    isAsking,
    async leave() {
      mayGo = true
      isAsking.value = false
      await navigateTo(way ?? '/')
    },
  }
}
