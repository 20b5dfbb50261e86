import { computed, type ComputedRef } from 'vue'
import { useApi } from '~/composables/api/api'
import { useMay } from '~/composables/people/use-may'
import type { BlankView } from '#shared/blank/blank-view'
import type { MaskView } from '#shared/scheme/mask-view'
import type { PaintListItem } from '#shared/shelf/paint-view'

/** Blanks of the workshop, for outlines, scales and choices. */
export async function useBlanks(): Promise<ComputedRef<readonly BlankView[]>> {
  const request = useApi()
  const { data } = await useAsyncData('room blanks', () => request('/api/blanks'), { deep: false })
  return computed(() => data.value ?? [])
}

/** Paints on the shelf with their swatches; none for those who may not read it. */
export async function useShelfPaints(): Promise<ComputedRef<readonly PaintListItem[]>> {
  const may = useMay()
  const request = useApi()
  const { data } = await useAsyncData('room paints', async () => may('shelf:read') ? request('/api/paints') : [], { deep: false })
  return computed(() => data.value ?? [])
}

/** Nets and stencils of the workshop; none for those who may not read them. */
export async function useWorkshopMasks(): Promise<ComputedRef<readonly MaskView[]>> {
  const may = useMay()
  const request = useApi()
  const { data } = await useAsyncData('room masks', async () => may('mask:read') ? request('/api/masks') : [], { deep: false })
  return computed(() => data.value ?? [])
}

/** Schemes on the bench now, each with the number of its newest run. What cannot be read shows nothing. */
export async function useBenchRuns(): Promise<ComputedRef<ReadonlyMap<string, number>>> {
  const may = useMay()
  const request = useApi()
  const { data } = await useAsyncData('room runs', async () => may('run:read') ? (await request('/api/runs').catch(() => null))?.items ?? [] : [], { deep: false })
  return computed(() => {
    const newest = new Map<string, number>()
    for (const { scheme, number } of data.value ?? []) newest.set(scheme.id, Math.max(number, newest.get(scheme.id) ?? 0))
    return newest
  })
}

/** Schemes whose card is shared now. What cannot be read shows nothing, since the wall does not depend on it. */
export async function useSharedCards(): Promise<ComputedRef<ReadonlySet<string>>> {
  const may = useMay()
  const request = useApi()
  const { data } = await useAsyncData('room cards', async () => may('card:read') ? request('/api/cards').catch(() => []) : [], { deep: false })
  return computed(() => new Set((data.value ?? []).filter(card => card.state === 'shared').map(card => card.schemeId)))
}
