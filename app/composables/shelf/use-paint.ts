import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { paintKey } from './shelf-keys'
import type { PaintUse, PaintView } from '#shared/shelf/paint-view'

/** One paint on the page, and where it is laid. */
export interface PaintOnPage {
  /** Null while it cannot be read; `error` says why. */
  paint: ComputedRef<PaintView | null>
  uses: ComputedRef<readonly PaintUse[]>
  error: Ref<unknown>
  refresh: () => Promise<void>
}

/** Reads one paint with its optics, and the schemes that lay it. */
export async function usePaint(paintId: string): Promise<PaintOnPage> {
  const request = useApi()
  const [paint, uses] = await Promise.all([
    useAsyncData(paintKey(paintId), () => request('/api/paints/:paintId', { params: { paintId } }), { deep: false }),
    useAsyncData(`${paintKey(paintId)} uses`, () => request('/api/paints/:paintId/uses', { params: { paintId } }), { deep: false }),
  ])
  return {
    paint: computed(() => paint.data.value ?? null),
    uses: computed(() => uses.data.value ?? []),
    error: paint.error,
    refresh: () => paint.refresh(),
  }
}
