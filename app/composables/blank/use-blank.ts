import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { blankKey } from './blank-keys'
import { measureBlank, type MeasuredBlank } from './measure-blank'
import type { BlankView } from '#shared/blank/blank-view'

/** A scheme painted on a blank. */
export interface PaintedOn { schemeId: string, name: string }

/** One blank on the page, its measures, and the finishes painted on it. */
export interface BlankOnPage {
  /** Null while it cannot be read; `error` says why. */
  blank: ComputedRef<BlankView | null>
  measured: ComputedRef<MeasuredBlank | null>
  schemes: ComputedRef<readonly PaintedOn[]>
  error: Ref<unknown>
  refresh: () => Promise<void>
}

/** Reads one blank; it is measured where it is read first, and the measures travel with the page. */
export async function useBlank(blankId: string): Promise<BlankOnPage> {
  const request = useApi()
  const [read, painted] = await Promise.all([
    useAsyncData(blankKey(blankId), async () => {
      const blank = await request('/api/blanks/:blankId', { params: { blankId } })
      return { blank, measured: measureBlank(blank.shape) }
    }, { deep: false }),
    useAsyncData(`${blankKey(blankId)} schemes`, () => request('/api/schemes', { query: { blankId } }), { deep: false }),
  ])
  return {
    blank: computed(() => read.data.value?.blank ?? null),
    measured: computed(() => read.data.value?.measured ?? null),
    schemes: computed(() => (painted.data.value?.items ?? []).map(({ id, name }) => ({ schemeId: id, name }))),
    error: read.error,
    refresh: () => read.refresh(),
  }
}
