import { computed, type ComputedRef, type Ref, ref, shallowRef, watch } from 'vue'
import { api } from '~/composables/api/api'
import { useZoneColours } from '~/composables/picture/use-zone-colours'
import { explain } from '~/errors/explain'
import type { Look } from '#shared/picture/look'
import type { ZoneColour } from '#shared/picture/zone-colours'

/** Colours of another scheme, by zone. */
export interface UseOtherScheme {
  /** Schemes to choose from, this one left out; null until they are read. */
  schemes: Ref<readonly { id: string, name: string }[] | null>
  chosen: Ref<string | undefined>
  zones: ComputedRef<readonly ZoneColour[] | null>
  failed: Ref<string | null>
}

/** Reads the workshop's schemes and, of the chosen one, what its draft looks like in each zone after the clear. Only in a browser. */
export function useOtherScheme(ownId: string): UseOtherScheme {
  const schemes = shallowRef<readonly { id: string, name: string }[] | null>(null)
  const chosen = ref<string>()
  const look = shallowRef<Look | null>(null)
  const failed = ref<string | null>(null)
  const zones = useZoneColours(look, { upTo: 'all', clear: true, light: { tilt: 45 } })

  async function readAll(): Promise<void> {
    const all: { id: string, name: string }[] = []
    let after: string | null = null
    do {
      const page: { items: readonly { id: string, name: string }[], next: string | null } = await api('/api/schemes', { query: { ...after ? { after } : {} } })
      all.push(...page.items.map(({ id, name }) => ({ id, name })))
      after = page.next
    } while (after)
    schemes.value = all.filter(({ id }) => id !== ownId)
  }
  readAll().catch((error: unknown) => {
    failed.value = explain(error)
  })

  watch(chosen, async (id) => {
    look.value = null
    zones.value = null
    failed.value = null
    if (!id) return
    try {
      const scheme = await api('/api/schemes/:schemeId', { params: { schemeId: id } })
      if (chosen.value === id) look.value = { body: scheme.draft, materials: scheme.materials }
    }
    catch (error) {
      if (chosen.value === id) failed.value = explain(error)
    }
  })

  return { schemes, chosen, failed, zones: computed(() => look.value ? zones.value : null) }
}
