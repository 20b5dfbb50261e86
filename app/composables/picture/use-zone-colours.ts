import { shallowRef, toValue, type MaybeRefOrGetter, type ShallowRef } from 'vue'
import { useThreadAnswer } from './use-thread-answer'
import type { ZoneName } from '#shared/blank/zone-names'
import type { PromiseSpread } from '#shared/optics/spread'
import type { LetDown, LetDownWish } from '#shared/picture/let-down'
import type { Look } from '#shared/picture/look'
import type { ZoneColour, ZoneWish } from '#shared/picture/zone-colours'

/** Promised colours of every zone, and how sure they are. */
export interface UseZonePromises {
  /** Null until they are there for the first time. */
  zones: ShallowRef<ZoneColour[] | null>
  /** By zone, of the newest colours; null while it is being worked out. */
  spreads: ShallowRef<ReadonlyMap<ZoneName, PromiseSpread> | null>
}

/** The promised colours of every zone, worked out away from the page; null until they are there for the first time. Only in a browser. */
export function useZoneColours(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<ZoneWish>): ShallowRef<ZoneColour[] | null> {
  return askZones(look, wish, false).zones
}

/** The promised colours of every zone, and a moment later how sure each is. Only in a browser. */
export function useZonePromises(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<ZoneWish>): UseZonePromises {
  return askZones(look, wish, true)
}

function askZones(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<ZoneWish>, sure: boolean): UseZonePromises {
  const zones = shallowRef<ZoneColour[] | null>(null)
  const spreads = shallowRef<ReadonlyMap<ZoneName, PromiseSpread> | null>(null)
  useThreadAnswer(
    () => {
      const now = toValue(look)
      return now && { ask: 'zones', look: now, wish: toValue(wish), sure }
    },
    (answer) => {
      if (answer.answer === 'zones') [zones.value, spreads.value] = [answer.zones, null]
      if (answer.answer === 'spreads') spreads.value = new Map(answer.spreads)
    },
  )
  return { zones, spreads }
}

/** Colours of one coat over its present ground, pass by pass; null while nothing is asked or nothing has come yet. Only in a browser. */
export function useLetDown(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<LetDownWish | null>): ShallowRef<LetDown | null> {
  const found = shallowRef<LetDown | null>(null)
  useThreadAnswer(
    () => {
      const [now, wanted] = [toValue(look), toValue(wish)]
      return now && wanted && { ask: 'let-down', look: now, letDown: wanted }
    },
    (answer) => {
      if (answer.answer === 'let-down') found.value = answer.letDown
    },
  )
  return found
}
