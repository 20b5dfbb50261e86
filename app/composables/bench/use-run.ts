import { computed, type ComputedRef, type Ref } from 'vue'
import { runKey } from './run-keys'
import type { RunView } from '#shared/bench/run-view'

/** A run with its frozen finish and everything that was done in it. */
export async function useRun(runId: string, readFor: 'follow' | 'report'): Promise<{ run: ComputedRef<RunView | null>, error: Ref<unknown>, refresh: () => Promise<void> }> {
  const request = useRequestFetch()
  const { data, error, refresh } = await useAsyncData(runKey(runId, readFor), () => request(`/api/runs/${runId}`), { deep: false })
  return { run: computed(() => data.value ?? null), error, refresh: () => refresh() }
}
