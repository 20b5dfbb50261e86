import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { BLANKS_KEY } from './blank-keys'
import type { BlankView } from '#shared/blank/blank-view'

/** Every blank of the workshop, by name, retired ones too. */
export async function useBlanks(): Promise<{ blanks: ComputedRef<readonly BlankView[]>, error: Ref<unknown>, refresh: () => Promise<void> }> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(BLANKS_KEY, () => request('/api/blanks'), { deep: false })
  return { blanks: computed(() => data.value ?? []), error, refresh: () => refresh() }
}
