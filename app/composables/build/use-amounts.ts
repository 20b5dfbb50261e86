import { computed, type ComputedRef, type Ref } from 'vue'
import { useBuild } from './use-build'
import { useMay } from '~/composables/people/use-may'
import { usePlanning, type UsePlanning } from '~/composables/units/use-planning'
import { zoneAreas } from '#shared/blank/zone-areas'
import { BODY_ZONES, ZONE_LABELS, finOfZone } from '#shared/blank/zone-names'
import { type AmountInputs, amounts, type CoatAmount, paintTotals } from '#shared/scheme/amounts'
import { type Cost, costOf } from '#shared/scheme/amounts/cost'
import { type DryFilm, liftOf, weightTogether } from '#shared/scheme/amounts/dry-film'
import type { Figure } from '#shared/scheme/amounts/figure'
import { areaCells } from '#shared/scheme/coat-area'

/** What is taken of one paint, and whether it is there. */
export interface FromBottle {
  paintId: string
  name: string
  ml: number
  /** On the shelf; null when the paint is no longer there. */
  left: number | null
}

/** Paint, reducer and mix for the pieces one has in mind. */
export interface Amounts {
  pieces: Ref<number>
  planning: UsePlanning
  given: ComputedRef<AmountInputs>
  coats: ComputedRef<CoatAmount[]>
  byCoat: ComputedRef<ReadonlyMap<string, CoatAmount>>
  bottles: ComputedRef<FromBottle[]>
  /** Weight of the clear on one piece, of paint and clear together, and what both do to its lift. */
  added: ComputedRef<{ clear: Figure, all: Figure, lift: Figure }>
  /** Null for those who may not see cost. */
  cost: ComputedRef<Cost | null>
  /** Zones of the blank with their areas, cm²; worked out when they are looked at. */
  zones: ComputedRef<{ zone: string, name: string, area: number }[]>
  paintName: (paintId: string) => string
}

const filmOf = ({ area, film, dry }: CoatAmount): DryFilm => ({ area: area.value, film: film.value, weight: dry.value })

/** Amounts of the scheme on the work surface; the number of pieces is kept while one goes from scheme to scheme. */
export function useAmounts(): Amounts {
  const build = useBuild()
  const may = useMay()
  const planning = usePlanning()
  const pieces = useState('build pieces', () => 12)
  const cells = computed(() => areaCells(build.blank.value))
  const given = computed((): AmountInputs => ({ ...planning.plan.value, pieces: pieces.value }))
  const coats = computed(() => import.meta.client ? amounts(build.draft.body.value, build.draft.materials.value, cells.value, given.value) : [])
  const shelf = computed(() => new Map(build.paints.value.map(paint => [paint.id, paint])))
  const paintName = (paintId: string) => build.draft.materials.value.paints.find(paint => paint.id === paintId)?.name ?? 'a paint that is gone'
  return {
    pieces, planning, given, coats, paintName,
    byCoat: computed(() => new Map(coats.value.map(coat => [coat.coatId, coat]))),
    bottles: computed(() => paintTotals(coats.value).map(({ paintId, ml }) => ({ paintId, ml, name: paintName(paintId), left: shelf.value.get(paintId)?.volumeLeft ?? null }))),
    added: computed(() => {
      const films = coats.value.map(filmOf)
      return { clear: weightTogether(coats.value.filter(coat => coat.isClear).map(filmOf)), all: weightTogether(films), lift: liftOf(films) }
    }),
    cost: computed(() => {
      if (!may('shelf:cost')) return null
      const prices = new Map(build.paints.value.flatMap(({ id, pricePerMl }) => pricePerMl === undefined ? [] : [[id, pricePerMl] as const]))
      return costOf(coats.value, pieces.value, prices)
    }),
    zones: computed(() => {
      const { fins } = build.draft.materials.value.blank.shape
      const labels: Readonly<Record<string, string>> = ZONE_LABELS
      const order = [...BODY_ZONES.filter(zone => zone !== 'top' && zone !== 'bottom'), ...fins.map(fin => `fin:${fin.id}` as const)]
      const areas = zoneAreas(build.blank.value)
      return order.map(zone => ({ zone, name: labels[zone] ?? `Fin, ${finOfZone(zone)?.replaceAll('-', ' ')}`, area: (areas.get(zone) ?? 0) / 100 }))
    }),
  }
}
