import { computed, type ComputedRef, ref, type Ref, watch } from 'vue'
import { api } from '~/composables/api/api'
import type { SchemeRowView } from '#shared/scheme/scheme-view'

/** Finishes a card could be started of, and why the chosen one cannot be, if so. */
export interface CardStart {
  schemes: Ref<readonly SchemeRowView[]>
  chosen: Ref<string | undefined>
  /** Absent when a card can be started of the chosen scheme. */
  whyNot: ComputedRef<string | undefined>
  /** It is the photo that is missing. */
  needsPhoto: ComputedRef<boolean>
  /** Reads the list; throws when it cannot be read. */
  read: () => Promise<void>
}

/** Choosing the scheme of a new card: it must have been published, and somebody must have photographed it. */
export function useCardStart(): CardStart {
  const schemes = ref<readonly SchemeRowView[]>([])
  const chosen = ref<string>()
  const photoCount = ref<number | null>(null)
  const needsPhoto = computed(() => photoCount.value === 0)
  const scheme = computed(() => schemes.value.find(row => row.id === chosen.value))

  watch(chosen, async (id) => {
    photoCount.value = null
    if (!id) return
    const photos = await api('/api/schemes/:schemeId/photos', { params: { schemeId: id } }).catch(() => null)
    if (chosen.value === id) photoCount.value = photos?.length ?? null
  })

  const whyNot = computed(() => {
    if (!scheme.value) return 'Choose a finish first.'
    if (scheme.value.publishedAt === null) return 'It was never published. A card shows a finished scheme: publish a revision first.'
    return needsPhoto.value ? 'It has no photo yet. Photograph a piece first.' : undefined
  })

  async function read() {
    const all: SchemeRowView[] = []
    let after: string | null = null
    do {
      const page: { items: SchemeRowView[], next: string | null } = await api('/api/schemes', { query: { retired: 'without', ...after && { after } } })
      all.push(...page.items)
      after = page.next
    } while (after)
    schemes.value = all
  }
  return { schemes, chosen, whyNot, needsPhoto, read }
}
