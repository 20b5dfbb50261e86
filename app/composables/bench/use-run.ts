import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { runKey } from './run-keys'
import { RunView } from '#shared/bench/run-view'

/** A run with its frozen finish and everything that was done in it, for who looks back on it. */
export async function useRun(runId: string): Promise<{ run: ComputedRef<RunView | null>, error: Ref<unknown>, refresh: () => Promise<void> }> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(runKey(runId), async () => RunView.parse(await request('/api/runs/:runId', { params: { runId } })), { deep: false })
  return { run: computed(() => data.value ?? null), error, refresh: () => refresh() }
}
