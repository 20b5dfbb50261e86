import { computed, type ComputedRef, type Ref, ref, shallowRef, watch } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { runsKey } from './run-keys'
import { RunListItem, RunListPage, type RunStartInput } from '#shared/bench/run-view'

/** Runs of one kind on the page. */
export interface Runs {
  items: ComputedRef<readonly RunListItem[]>
  error: Ref<unknown>
  hasMore: ComputedRef<boolean>
  /** Reads the next page and adds it; throws when it cannot be read. */
  loadMore: () => Promise<void>
}

/** What is on the bench, or what was made; the newest first. */
export async function useRuns(state: 'bench' | 'made'): Promise<Runs> {
  const request = useApi()
  const more = shallowRef<readonly RunListItem[]>([])
  const next = ref<string | null>(null)
  const { data, error } = await useAsyncData(runsKey(state), async () => RunListPage.parse(await request('/api/runs', { query: { state } })), { deep: false })
  watch(data, (page) => {
    more.value = []
    next.value = page?.next ?? null
  }, { immediate: true })
  return {
    items: computed(() => [...data.value?.items ?? [], ...more.value]),
    error,
    hasMore: computed(() => next.value !== null),
    async loadMore() {
      const after = next.value
      if (after === null) return
      const page = RunListPage.parse(await api('/api/runs', { query: { state, after } }))
      if (next.value !== after) return
      more.value = [...more.value, ...page.items]
      next.value = page.next
    },
  }
}

/** Starts a run; the key makes a press that was sent twice one run. */
export async function startRun(start: RunStartInput, key: string): Promise<RunListItem> {
  return RunListItem.parse(await api('/api/runs', { method: 'POST', body: start, headers: { 'idempotency-key': key } }))
}
