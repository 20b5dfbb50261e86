import { computed, type ComputedRef, type Ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { useMay } from '~/composables/people/use-may'

/** What a scheme is called, for those who may not read how it is made as much as for those who may. */
export interface SchemeCaption { name: string, fish: string, isPublished: boolean }

/** The caption of a scheme. */
export async function useSchemeCaption(schemeId: string): Promise<{ caption: ComputedRef<SchemeCaption | null>, error: Ref<unknown> }> {
  const request = useApi()
  const mayRead = useMay()('scheme:read')
  const { data, error } = await useAsyncData(`scheme caption ${schemeId}`, async (): Promise<SchemeCaption> => {
    if (mayRead) {
      const { name, fish, headNumber } = await request('/api/schemes/:schemeId', { params: { schemeId } })
      return { name, fish, isPublished: headNumber > 0 }
    }
    const { name, fish } = await request('/api/schemes/:schemeId/look', { params: { schemeId } })
    return { name, fish, isPublished: true }
  }, { deep: false })
  return { caption: computed(() => data.value ?? null), error }
}
