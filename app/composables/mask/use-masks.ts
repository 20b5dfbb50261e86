import { computed, type ComputedRef, type Ref } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { MASKS_KEY } from './mask-keys'
import type { MaskDraft, MaskView } from '#shared/scheme/mask-view'

/** The masks of the workshop and what can be done with them; each verb throws when it is refused. */
export interface Masks {
  masks: ComputedRef<readonly MaskView[]>
  error: Ref<unknown>
  refresh: () => Promise<void>
  add: (draft: MaskDraft) => Promise<MaskView>
  /** A mask changed meanwhile is refused. */
  change: (mask: MaskView, change: Partial<MaskDraft & { retired: boolean }>) => Promise<MaskView>
}

/** Meshes and stencils of the workshop, retired ones too. */
export async function useMasks(): Promise<Masks> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(MASKS_KEY, () => request('/api/masks'), { deep: false })
  return {
    masks: computed(() => data.value ?? []),
    error,
    refresh: () => refresh(),
    async add(draft) {
      // The key lets a request that is sent again on a bad line add one mask, not two.
      const mask = await api('/api/masks', { method: 'POST', body: draft, headers: { 'idempotency-key': crypto.randomUUID() } })
      await refresh()
      return mask
    },
    async change({ id, version, name, form }, change) {
      const mask = await api('/api/masks/:maskId', { params: { maskId: id }, method: 'PUT', body: { name, form, ...change }, headers: { 'if-match': `"v${version}"` } })
      await refresh()
      return mask
    },
  }
}
