import { computed, type ComputedRef } from 'vue'
import { api } from '~/composables/api/api'
import type { RunMeasureInput } from '#shared/bench/run-measure'
import type { PhotoView } from '#shared/photos/photo-view'

/** Photos a piece of a run can be measured from, and the noting of what was measured. */
export interface RunMeasure {
  /** Of this run first, then of its scheme. */
  photos: ComputedRef<readonly PhotoView[]>
  /** Notes the colours of a piece; throws when they are refused. */
  measure: (input: RunMeasureInput) => Promise<void>
}

/** Measures pieces of a run from photos. Read on the page: nobody waits for it who only reads. */
export function useRunMeasure(runId: string, schemeId: string): RunMeasure {
  const { data } = useAsyncData(`photos to measure ${runId}`, () => api('/api/schemes/:schemeId/photos', { params: { schemeId } }), { deep: false, server: false, lazy: true })
  return {
    photos: computed(() => (data.value ?? []).toSorted((a, b) => Number(b.run?.id === runId) - Number(a.run?.id === runId))),
    async measure(input) {
      await api('/api/runs/:runId/measures', { params: { runId }, method: 'POST', body: input })
      await refreshNuxtData(`run ${runId} what came of it`)
    },
  }
}

/** Withdraws a measure that was wrong; throws when it is refused. */
export async function withdrawMeasure(runId: string, measureId: string): Promise<void> {
  await api('/api/runs/:runId/measures/:measureId/withdraw', { params: { runId, measureId }, method: 'POST' })
  await refreshNuxtData(`run ${runId} what came of it`)
}
