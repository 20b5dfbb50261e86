import { computed, type ComputedRef, type Ref } from 'vue'
import { api, useApi } from '~/composables/api/api'
import type { BottleDraft, BottleView } from '#shared/shelf/bottle'

/** Bottles of a paint on the page, and what can be done with them; each act throws when it is refused. */
export interface Bottles {
  /** Those in use first. */
  bottles: ComputedRef<readonly BottleView[]>
  error: Ref<unknown>
  /** Puts one more on the shelf. */
  add: (draft: BottleDraft) => Promise<BottleView>
  /** Changes one as it was seen. */
  change: (bottle: BottleView, draft: BottleDraft) => Promise<void>
}

/** Bottles of a paint. `onChanged` hears that what is left of the paint may be another figure now. */
export async function useBottles(paintId: string, onChanged: () => Promise<void>): Promise<Bottles> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(`bottles ${paintId}`, () => request('/api/paints/:paintId/bottles', { params: { paintId } }), { deep: false })
  const again = async () => {
    await Promise.all([refresh(), onChanged()])
  }
  return {
    bottles: computed(() => (data.value ?? []).toSorted((a, b) => Number(a.state === 'retired') - Number(b.state === 'retired'))),
    error,
    async add(draft) {
      const made = await api('/api/paints/:paintId/bottles', { params: { paintId }, method: 'POST', body: draft })
      await again()
      return made
    },
    async change({ id, version }, draft) {
      try {
        await api('/api/bottles/:bottleId', { params: { bottleId: id }, method: 'PUT', body: draft, headers: { 'if-match': `"v${version}"` } })
      }
      finally {
        await again()
      }
    },
  }
}
