import { computed, type ComputedRef, shallowRef, watch } from 'vue'
import { useDebounceFn } from '@vueuse/core'
import { type CoatShift, firstSeen, goesOnWith, nextSeen, type ShiftState, shiftsSentence } from './film-shift'
import { coatTitle } from './film-rows'
import type { Build } from './use-build'
import { useSpoken } from '~/composables/ui/use-spoken'
import { coatsOf } from '#shared/scheme/stack-order'

/** A hand that stops for so long has done what it wanted, ms. */
const STILL_MS = 900

/** Which coats look otherwise since what was last done, for the rows of the section. */
export interface FilmShift {
  shifts: ComputedRef<readonly CoatShift[]>
  of: (coatId: string) => CoatShift | undefined
  sentence: ComputedRef<string>
  titleOf: (coatId: string) => string
}

/** Follows a build: what is shown stands until something else is done, and changes only when the colours are worked out. */
export function useFilmShift(build: Pick<Build, 'zones' | 'draft' | 'coatId'>): FilmShift {
  const { speak } = useSpoken()
  const state = shallowRef<ShiftState | null>(null)
  const body = build.draft.body

  const titleOf = (coatId: string) => {
    const coat = coatsOf(body.value.stack).find(each => each.id === coatId)
    return coat ? coatTitle(coat, build.draft.materials.value.paints) : ''
  }
  const shifts = computed(() => state.value?.shifts ?? [])
  const sentence = computed(() => shiftsSentence(shifts.value, titleOf))
  const tell = useDebounceFn(() => {
    if (sentence.value) speak(sentence.value)
  }, STILL_MS)

  watch(build.zones, (seen) => {
    if (!seen) return
    const now = { body: body.value, zones: seen }
    state.value = state.value ? nextSeen(state.value, now, build.coatId.value) : firstSeen(now)
    if (state.value.doing && shifts.value.length > 0) void tell()
  })
  watch(body, (next) => {
    const { value } = state
    if (value && value.shifts.length > 0 && !goesOnWith(value, next, build.coatId.value)) state.value = { ...value, shifts: [] }
  })

  return { shifts, sentence, titleOf, of: coatId => shifts.value.find(shift => shift.coatId === coatId) }
}
