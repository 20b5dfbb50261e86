import { computed, type ComputedRef, type Ref, ref, watch } from 'vue'
import { watchDebounced } from '@vueuse/core'
import { useFindCoat, type UseFindCoat } from './use-find-coat'
import type { SureCoat } from '#shared/optics/find-spread'
import type { Light } from '#shared/optics/lights'
import type { SeenLamp } from '#shared/optics/seen-wish'
import type { Look } from '#shared/picture/look'
import type { ZoneColour } from '#shared/picture/zone-colours'
import { applyEdit } from '#shared/scheme/edits'
import type { Coat } from '#shared/scheme/coat'
import { candidates } from '#shared/scheme/find/candidates'
import type { FindQuestion } from '#shared/scheme/find/find-messages'
import { rowFor, type StackPlace, whereOf } from '#shared/scheme/find/place'
import { proposedCoat } from '#shared/scheme/find/proposed-coat'
import { newCoat } from '#shared/scheme/new-coat'
import type { Lab } from '#shared/shelf/paint'
import type { PaintListItem } from '#shared/shelf/paint-view'

/** What the sheet is opened over. */
export interface FindGiven {
  look: () => Look
  paints: () => readonly PaintListItem[]
  zones: () => readonly ZoneColour[]
  zone: () => string
  /** The lamp it is looked at by; daylight when left out. */
  lamp?: () => SeenLamp | undefined
  coatId: () => string | null
}

/** A proposal and its name in the list. */
export interface Proposal { key: string, kind: 'bottle' | 'cup', found: SureCoat }

/** The sheet's question, and what came of it. */
export interface FindDesk {
  target: Ref<Lab | null>
  /** What the painter calls the wanted colour; kept as the coat's note. */
  called: Ref<string>
  chosenZones: Ref<string[]>
  judgedIn: Ref<string>
  place: Ref<StackPlace>
  clear: Ref<boolean>
  partsMost: Ref<1 | 2 | 3>
  second: Ref<Light>
  withAbsent: Ref<boolean>
  search: UseFindCoat
  /** How many paints are looked through. */
  shelfCount: ComputedRef<number>
  proposals: ComputedRef<Proposal[]>
  chosenKey: Ref<string | null>
  chosen: ComputedRef<Proposal | null>
  /** The chosen proposal as a coat, where it would stand, and the look with it. */
  laid: ComputedRef<{ coat: Coat, row: number, look: Look } | null>
  askAgain: () => void
}

const PASSES_MOST = 8
const DROPS_MOST = 8
const ANSWERS = 3
/** Quiet time after a change before a search begins, ms. */
const ASK_AFTER_MS = 220

/** Puts a question together, asks it whenever it changes, and makes a coat of what is chosen. Only in a browser. */
export function useFindQuestion(given: FindGiven): FindDesk {
  const search = useFindCoat()
  // One id for every proposal: what changes is the cup, so the picture keeps where the coat lies.
  const id = crypto.randomUUID()
  const target = ref<Lab | null>(null)
  const called = ref('')
  const chosenZones = ref<string[]>([given.zone()])
  const judgedIn = ref(given.zone())
  const place = ref<StackPlace>('top')
  const clear = ref(true)
  const partsMost = ref<1 | 2 | 3>(2)
  // A colour is wanted as daylight shows it; whoever looks by another lamp wants to know how it holds there.
  const lamp = given.lamp?.()
  const second = ref<Light>(typeof lamp === 'string' && lamp !== 'D65' ? lamp : 'A')
  const withAbsent = ref(false)
  const chosenKey = ref<string | null>(null)

  watch(chosenZones, (zones) => {
    if (!zones.includes(judgedIn.value)) judgedIn.value = zones[0] ?? given.zone()
  })

  const where = computed(() => whereOf(chosenZones.value))
  const row = computed(() => rowFor(given.look().body, given.look().materials, place.value, given.coatId()))
  const shelf = computed(() => candidates(given.look().materials.paints, given.paints(), withAbsent.value))

  const question = computed((): FindQuestion | null => {
    if (!target.value || shelf.value.length === 0) return null
    return {
      look: given.look(), coat: { ...newCoat(id), where: where.value }, row: row.value, zone: judgedIn.value, clear: clear.value, target: target.value,
      paints: shelf.value.map(({ id: paintId, cup }) => ({ id: paintId, cup })), second: second.value,
      passesMost: PASSES_MOST, dropsMost: DROPS_MOST, partsMost: partsMost.value, answers: ANSWERS,
    }
  })
  const askAgain = () => {
    if (question.value) search.ask(question.value)
  }
  watchDebounced(question, askAgain, { debounce: ASK_AFTER_MS })

  const proposals = computed((): Proposal[] => {
    const report = search.report.value
    if (!report) return []
    const named = (kind: Proposal['kind'], all: readonly SureCoat[]) => all.map(found => ({ key: found.parts.map(part => `${part.id} ${part.drops}`).join('+'), kind, found }))
    return [...named('bottle', report.paints), ...named('cup', report.mixes)]
  })
  // The nearest is taken up by itself; a choice that is still proposed stays.
  watch(proposals, (all) => {
    if (all.some(each => each.key === chosenKey.value)) return
    chosenKey.value = [...all].sort((a, b) => a.found.deltaE - b.found.deltaE)[0]?.key ?? null
  })
  const chosen = computed(() => proposals.value.find(each => each.key === chosenKey.value) ?? null)
  const laid = computed(() => {
    if (!chosen.value) return null
    const { body, materials } = given.look()
    const restOf = (paintId: string) => given.paints().find(paint => paint.id === paintId)?.restMinutes ?? 5
    const coat = proposedCoat(id, chosen.value.found, where.value, materials.paints, restOf, called.value)
    const after = coat && applyEdit(body, { do: 'add-coat', coat, row: row.value })
    return coat && after?.ok ? { coat, row: row.value, look: { body: after.body, materials } } : null
  })

  return { target, called, chosenZones, judgedIn, place, clear, partsMost, second, withAbsent, search, shelfCount: computed(() => shelf.value.length), proposals, chosenKey, chosen, laid, askAgain }
}
