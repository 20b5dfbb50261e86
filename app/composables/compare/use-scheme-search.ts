import { refDebounced } from '@vueuse/core'
import { type Ref, ref, shallowRef, watch } from 'vue'
import { api } from '~/composables/api/api'
import { explain } from '~/errors/explain'

/** Quiet time after typing before a search is sent, ms. */
const SEARCH_AFTER_MS = 250
/** So many are offered; more are found by more words. */
const OFFERED_MOST = 20

/** A scheme that can be chosen. */
export interface FoundScheme { id: string, name: string, fish: string }

/** Other schemes of the workshop by words: the newest work while nothing is typed. Asks nothing until `start`. */
export function useSchemeSearch(ownId: string): { words: Ref<string>, found: Ref<readonly FoundScheme[] | null>, failed: Ref<string | null>, start: () => void } {
  const words = ref('')
  const asked = refDebounced(words, SEARCH_AFTER_MS)
  const found = shallowRef<readonly FoundScheme[] | null>(null)
  const failed = ref<string | null>(null)
  let latest = 0

  async function look() {
    const now = ++latest
    failed.value = null
    try {
      const page: { items: readonly FoundScheme[] } = await api('/api/schemes', { query: { words: asked.value, limit: OFFERED_MOST } })
      if (now === latest) found.value = page.items.filter(({ id }) => id !== ownId)
    }
    catch (error) {
      if (now === latest) failed.value = explain(error)
    }
  }
  watch(asked, () => void look())
  return { words, found, failed, start: () => void look() }
}
