import { computed, type ComputedRef, type Ref, ref, shallowRef, watch } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { refDebounced } from '@vueuse/core'
import { SCHEMES_KEY } from './scheme-keys'
import type { SchemeRowView } from '#shared/scheme/scheme-view'

/** Quiet time after typing before a search is sent, ms. */
const SEARCH_AFTER_MS = 250

/** What one looks for. */
export interface SchemeSearch { words: string, blankId?: string, paintId?: string, retired: 'with' | 'without' }

/** The list on the page. */
export interface Schemes {
  /** What one looks for; changing it reads the list anew. */
  search: Ref<SchemeSearch>
  items: ComputedRef<readonly SchemeRowView[]>
  isLoading: ComputedRef<boolean>
  error: Ref<unknown>
  hasMore: ComputedRef<boolean>
  /** Reads the next page and adds it; throws when it cannot be read. */
  loadMore: () => Promise<void>
  refresh: () => Promise<void>
}

/** Schemes of the workshop, newest work first, with a search and pages. */
export async function useSchemes(start: Partial<SchemeSearch> = {}): Promise<Schemes> {
  const search = ref<SchemeSearch>({ words: '', retired: 'without', ...start })
  const asked = refDebounced(search, SEARCH_AFTER_MS)
  const request = useApi()
  const more = shallowRef<readonly SchemeRowView[]>([])
  const next = ref<string | null>(null)
  const loadingMore = ref(false)

  const { data, status, error, refresh } = await useAsyncData(SCHEMES_KEY, () => request('/api/schemes', { query: { ...asked.value } }), { watch: [asked], deep: false })

  watch(data, (page) => {
    more.value = []
    next.value = page?.next ?? null
  }, { immediate: true })

  return {
    search,
    items: computed(() => [...data.value?.items ?? [], ...more.value]),
    isLoading: computed(() => status.value === 'pending' || loadingMore.value),
    error,
    hasMore: computed(() => next.value !== null),
    async loadMore() {
      const after = next.value
      if (after === null || loadingMore.value) return
      loadingMore.value = true
      try {
        const page = await api('/api/schemes', { query: { ...asked.value, after } })
        // A search that changed meanwhile has its own first page: this one no longer belongs to it.
        if (next.value !== after) return
        more.value = [...more.value, ...page.items]
        next.value = page.next
      }
      finally {
        loadingMore.value = false
      }
    },
    refresh: () => refresh(),
  }
}
