import { computed, type ComputedRef, type Ref } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { RunReport, TakenIn } from '#shared/bench/run-report'

/** What the server adds to a run for who looks back on it. */
export interface UseRunReport {
  report: ComputedRef<RunReport | null>
  error: Ref<unknown>
  /** Takes what the bench did into the scheme's draft; throws when the draft has changed meanwhile. */
  takeIn: () => Promise<TakenIn>
}

/** Lots, times and yield of a run, and the way from it back into its scheme. */
export async function useRunReport(runId: string): Promise<UseRunReport> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(`run ${runId} what came of it`, async () => RunReport.parse(await request('/api/runs/:runId/report', { params: { runId } })), { deep: false })
  return {
    report: computed(() => data.value ?? null),
    error,
    async takeIn() {
      const version = data.value?.draftVersion
      const taken = TakenIn.parse(await api('/api/runs/:runId/take-in', { params: { runId }, method: 'POST', headers: { 'if-match': `"v${version ?? 0}"` } }))
      await refresh()
      return taken
    },
  }
}
