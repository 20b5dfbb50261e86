import { computed, type ComputedRef } from 'vue'
import { api } from '~/composables/api/api'
import type { BuildUpChange, BuildUpDraft, BuildUpView } from '#shared/scheme/build-up'

/** Key of the workshop's build-ups in the page's data. */
const BUILD_UPS_KEY = 'build-ups'

/** The workshop's build-ups on the page; each verb throws when it is refused. */
export interface BuildUps {
  /** By name; those put away too. Empty until they are read. */
  all: ComputedRef<readonly BuildUpView[]>
  add: (draft: BuildUpDraft) => Promise<BuildUpView>
  /** A build-up changed meanwhile is refused. */
  change: (buildUp: Pick<BuildUpView, 'id' | 'version'>, change: BuildUpChange) => Promise<BuildUpView>
}

/** Reads build-ups once the page stands in a browser: nothing on it waits for them. */
export function useBuildUps(): BuildUps {
  const { data, refresh } = useAsyncData<readonly BuildUpView[]>(BUILD_UPS_KEY, () => api('/api/build-ups'), { server: false, lazy: true, deep: false, default: () => [] })
  return {
    all: computed(() => data.value),
    async add(draft) {
      // The key lets a request that is sent again on a bad line save one build-up, not two.
      const made = await api('/api/build-ups', { method: 'POST', body: draft, headers: { 'idempotency-key': crypto.randomUUID() } })
      await refresh()
      return made
    },
    async change({ id, version }, change) {
      const changed = await api('/api/build-ups/:buildUpId', { params: { buildUpId: id }, method: 'PUT', body: change, headers: { 'if-match': `"v${version}"` } })
      await refresh()
      return changed
    },
  }
}
