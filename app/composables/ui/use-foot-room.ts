import type { Ref } from 'vue'
import { onBeforeUnmount } from 'vue'
import { useResizeObserver } from '@vueuse/core'

/**
 * Tells the page how tall its foot stands (`--foot`, px), since it wraps on a phone and is taller at the bench: what the
 * keyboard reaches is scrolled clear of it, and toasts stand above it. The stylesheet holds a likely height until then.
 */
export function useFootRoom(foot: Ref<HTMLElement | null>): void {
  useResizeObserver(foot, () => {
    if (foot.value) document.documentElement.style.setProperty('--foot', `${foot.value.offsetHeight}px`)
  })
  onBeforeUnmount(() => document.documentElement.style.removeProperty('--foot'))
}
