import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { compareKey, schemeKey } from './scheme-keys'
import type { CompareView, SchemeLookView, SchemeView } from '#shared/scheme/scheme-view'

/** One scheme as the page reads it. */
export interface SchemeOnPage<View> {
  /** Null while it cannot be read; `error` says why. */
  scheme: ComputedRef<View | null>
  error: Ref<unknown>
  refresh: () => Promise<void>
}

/** A scheme with its draft, materials and revisions, for those who read recipes. */
export async function useScheme(schemeId: string): Promise<SchemeOnPage<SchemeView>> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(schemeKey(schemeId), () => request('/api/schemes/:schemeId', { params: { schemeId } }), { deep: false })
  return { scheme: computed(() => data.value ?? null), error, refresh: () => refresh() }
}

/** A published scheme as everybody in the workshop may see it. */
export async function useSchemeLook(schemeId: string): Promise<SchemeOnPage<SchemeLookView>> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(`${schemeKey(schemeId)} look`, () => request('/api/schemes/:schemeId/look', { params: { schemeId } }), { deep: false })
  return { scheme: computed(() => data.value ?? null), error, refresh: () => refresh() }
}

/** Two versions of a scheme, or one of it and one of another; `draft` or a revision's number. */
export async function useSchemeCompare(schemeId: string, from: string, to: string, other?: string): Promise<{ two: ComputedRef<CompareView | null>, error: Ref<unknown> }> {
  const request = useApi()
  const query = { from, to, ...other ? { other } : {} }
  const { data, error } = await useAsyncData(compareKey(schemeId, from, to, other), () => request('/api/schemes/:schemeId/compare', { params: { schemeId }, query }), { deep: false })
  return { two: computed(() => data.value ?? null), error }
}
