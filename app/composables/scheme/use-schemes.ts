import { computed, type ComputedRef, type Ref, onScopeDispose, ref, shallowRef, watch } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { refDebounced } from '@vueuse/core'
import { SCHEMES_KEY } from './scheme-keys'
import type { SchemeRowView } from '#shared/scheme/scheme-view'
import type { NearView, WallWish } from '#shared/scheme/wall/wall-wish'

/** Quiet time after typing before a search is sent, ms. */
const SEARCH_AFTER_MS = 250
/** While colours are still being worked out, a search by colour is asked again so often, ms. */
const ASK_AGAIN_MS = 2500

/** The list on the page. */
export interface Schemes {
  /** What one looks for; changing it reads the list anew. */
  search: Ref<WallWish>
  items: ComputedRef<readonly SchemeRowView[]>
  /** How near each comes, when a colour was looked for. */
  near: ComputedRef<Readonly<Record<string, NearView>>>
  /** Looks whose colours are still to be worked out, when a colour was looked for. */
  waiting: ComputedRef<number>
  isLoading: ComputedRef<boolean>
  error: Ref<unknown>
  hasMore: ComputedRef<boolean>
  /** Reads the next page and adds it; throws when it cannot be read. */
  loadMore: () => Promise<void>
  refresh: () => Promise<void>
}

/** Schemes of the workshop, newest work or nearest colour first, with a search and pages. */
export async function useSchemes(start: Partial<WallWish> = {}): Promise<Schemes> {
  const search = ref<WallWish>({ words: '', retired: 'without', ...start })
  const asked = refDebounced(search, SEARCH_AFTER_MS)
  const request = useApi()
  const more = shallowRef<readonly { items: readonly SchemeRowView[], near: Readonly<Record<string, NearView>> }[]>([])
  const next = ref<string | null>(null)
  const loadingMore = ref(false)

  const { data, status, error, refresh } = await useAsyncData(SCHEMES_KEY, () => request('/api/schemes', { query: { ...asked.value } }), { watch: [asked], deep: false })

  let again: ReturnType<typeof setTimeout> | undefined
  onScopeDispose(() => clearTimeout(again))
  watch(data, (page) => {
    more.value = []
    next.value = page?.next ?? null
    clearTimeout(again)
    if (import.meta.client && page && page.waiting > 0) again = setTimeout(() => void refresh(), ASK_AGAIN_MS)
  }, { immediate: true })

  return {
    search,
    items: computed(() => [...data.value?.items ?? [], ...more.value.flatMap(page => page.items)]),
    near: computed(() => Object.assign({}, data.value?.near, ...more.value.map(page => page.near)) as Record<string, NearView>),
    waiting: computed(() => data.value?.waiting ?? 0),
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
        more.value = [...more.value, page]
        next.value = page.next
      }
      finally {
        loadingMore.value = false
      }
    },
    refresh: () => refresh(),
  }
}
