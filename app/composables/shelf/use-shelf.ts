import { computed, type ComputedRef, type Ref, ref } from 'vue'
import { useApi } from '~/composables/api/api'
import { SHELF_KEY } from './shelf-keys'
import { ANYTHING, findPaints, type ShelfOrder, type ShelfSearch, sortPaints } from '#shared/shelf/sort-shelf'
import type { PaintListItem } from '#shared/shelf/paint-view'

/** The shelf on the page: what is asked of it, and what is found. */
export interface Shelf {
  search: Ref<ShelfSearch>
  order: Ref<ShelfOrder>
  /** Every paint of the workshop, retired ones too. */
  all: ComputedRef<readonly PaintListItem[]>
  found: ComputedRef<readonly PaintListItem[]>
  error: Ref<unknown>
  refresh: () => Promise<void>
}

/** Reads the shelf once and looks through it here: it is small enough to be at hand whole. */
export async function useShelf(): Promise<Shelf> {
  const request = useApi()
  const search = ref<ShelfSearch>({ ...ANYTHING })
  const order = ref<ShelfOrder>('name')
  const { data, error, refresh } = await useAsyncData(SHELF_KEY, () => request('/api/paints'), { deep: false })
  const all = computed<readonly PaintListItem[]>(() => data.value ?? [])
  return { search, order, all, found: computed(() => sortPaints(findPaints(all.value, search.value), order.value)), error, refresh: () => refresh() }
}
