import { shallowRef, toValue, type MaybeRefOrGetter, type ShallowRef } from 'vue'
import { useThreadAnswer } from './use-thread-answer'
import type { ZoneName } from '#shared/blank/zone-names'
import type { LetDownStep } from '#shared/picture/let-down'
import type { Look } from '#shared/picture/look'
import type { ZoneColour, ZoneWish } from '#shared/picture/zone-colours'

/** The promised colours of every zone, worked out away from the page; null until they are there for the first time. Only in a browser. */
export function useZoneColours(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<ZoneWish>): ShallowRef<ZoneColour[] | null> {
  const zones = shallowRef<ZoneColour[] | null>(null)
  useThreadAnswer(
    () => {
      const now = toValue(look)
      return now && { ask: 'zones', look: now, wish: toValue(wish) }
    },
    (answer) => {
      if (answer.answer === 'zones') zones.value = answer.zones
    },
  )
  return zones
}

/** Which coat is let down where. */
export interface LetDownWish { coatId: string, zone: ZoneName, passesMost: number, clear: boolean }

/** Colours of one coat over its present ground, pass by pass; null while nothing is asked or nothing has come yet. Only in a browser. */
export function useLetDown(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<LetDownWish | null>): ShallowRef<LetDownStep[] | null> {
  const steps = shallowRef<LetDownStep[] | null>(null)
  useThreadAnswer(
    () => {
      const [now, wanted] = [toValue(look), toValue(wish)]
      return now && wanted && { ask: 'let-down', look: now, ...wanted }
    },
    (answer) => {
      if (answer.answer === 'let-down') steps.value = answer.steps
    },
  )
  return steps
}
