import { computed, type ComputedRef } from 'vue'
import { z } from 'zod'
import { RunMeasureView, type RunMeasureInput } from '#shared/bench/run-measure'
import { PhotoView } from '#shared/photos/photo-view'

/** Photos a piece of a run can be measured from, and the noting of what was measured. */
export interface RunMeasure {
  /** Of this run first, then of its scheme. */
  photos: ComputedRef<readonly PhotoView[]>
  /** Notes the colours of a piece; throws when they are refused. */
  measure: (input: RunMeasureInput) => Promise<void>
}

/** Measures pieces of a run from photos. Read on the page: nobody waits for it who only reads. */
export function useRunMeasure(runId: string, schemeId: string): RunMeasure {
  const photosAt: string = `/api/schemes/${schemeId}/photos`
  const measuresAt: string = `/api/runs/${runId}/measures`
  const { data } = useAsyncData(`photos to measure ${runId}`, async () => z.array(PhotoView).parse(await $fetch<unknown>(photosAt)), { deep: false, server: false, lazy: true })
  return {
    photos: computed(() => (data.value ?? []).toSorted((a, b) => Number(b.run?.id === runId) - Number(a.run?.id === runId))),
    async measure(input) {
      RunMeasureView.parse(await $fetch<unknown>(measuresAt, { method: 'POST', body: input }))
      await refreshNuxtData(`run ${runId} what came of it`)
    },
  }
}
