import { computed, type ComputedRef } from 'vue'
import { api, useApi } from '~/composables/api/api'
import type { SavedSearchView, WallChoices, WallWish } from '#shared/scheme/wall/wall-wish'

/** What the wall can be narrowed by. What cannot be read offers nothing, since the wall does not depend on it. */
export async function useWallChoices(): Promise<ComputedRef<WallChoices>> {
  const request = useApi()
  const { data } = await useAsyncData('wall choices', () => request('/api/schemes/choices').catch(() => null), { deep: false })
  return computed(() => data.value ?? { fish: [], people: [] })
}

/** The searches one keeps, and the ways to keep and forget one; each throws when it could not be done. */
export function useSavedSearches() {
  const request = useApi()
  const { data, refresh } = useAsyncData('wall searches', () => request('/api/saved-searches').catch(() => []), { deep: false })
  return {
    searches: computed<readonly SavedSearchView[]>(() => data.value ?? []),
    async keep(name: string, wish: WallWish) {
      await api('/api/saved-searches', { method: 'POST', body: { name, wish } })
      await refresh()
    },
    async forget(searchId: string) {
      await api('/api/saved-searches/:searchId', { method: 'DELETE', params: { searchId } })
      await refresh()
    },
  }
}
