import { computed, type ComputedRef, type Ref } from 'vue'
import { useBuild } from './use-build'
import { type AmountInputs, amounts, type CoatAmount, paintTotals, PLANNING_VALUES } from '#shared/scheme/amounts'
import { areaCells } from '#shared/scheme/coat-area'

/** Paint, reducer and mix for the pieces one has in mind. */
export interface Amounts {
  pieces: Ref<number>
  given: ComputedRef<AmountInputs>
  coats: ComputedRef<CoatAmount[]>
  byCoat: ComputedRef<ReadonlyMap<string, CoatAmount>>
  totals: ComputedRef<{ paintId: string, ml: number }[]>
}

/** Amounts of the scheme on the work surface; the number of pieces is kept while one goes from scheme to scheme. */
export function useAmounts(): Amounts {
  const build = useBuild()
  const pieces = useState('build pieces', () => 12)
  const cells = computed(() => areaCells(build.blank.value))
  const given = computed((): AmountInputs => ({ ...PLANNING_VALUES, pieces: pieces.value }))
  const coats = computed(() => import.meta.client ? amounts(build.draft.body.value, build.draft.materials.value, cells.value, given.value) : [])
  return {
    pieces, given, coats,
    byCoat: computed(() => new Map(coats.value.map(coat => [coat.coatId, coat]))),
    totals: computed(() => paintTotals(coats.value)),
  }
}
