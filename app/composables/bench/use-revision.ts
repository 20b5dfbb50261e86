import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { z } from 'zod'
import { RevisionView } from '#shared/scheme/scheme-view'

/** What is needed of a list of revisions here. */
const Numbered = z.object({ items: z.array(z.object({ number: z.number() })) })

/** One revision of a finish, as it was frozen. */
export async function useRevision(schemeId: string, number: number): Promise<{ revision: ComputedRef<RevisionView | null>, error: Ref<unknown> }> {
  const request = useApi()
  const { data, error } = await useAsyncData(`revision ${schemeId} ${number}`, async () => RevisionView.parse(await request('/api/schemes/:schemeId/revisions/:number', { params: { schemeId, number } })), { deep: false })
  return { revision: computed(() => data.value ?? null), error }
}

/** The newest revision's number of a finish; 0 when it was never published. */
export async function newestRevision(schemeId: string): Promise<number> {
  const request = useApi()
  const { data } = await useAsyncData(`newest revision ${schemeId}`, async () => Numbered.parse(await request('/api/schemes/:schemeId/revisions', { params: { schemeId } })), { deep: false })
  return Math.max(0, ...data.value?.items.map(revision => revision.number) ?? [])
}
