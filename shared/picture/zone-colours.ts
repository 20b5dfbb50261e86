import type { ZoneName } from '#shared/blank/zone-names'
import type { BassCatch } from '#shared/optics/bass-eyes'
import { bassCatchIn } from '#shared/optics/bass-map'
import { deltaE2000 } from '#shared/optics/delta-e'
import { quickPromise } from '#shared/optics/quick-promise'
import { type PromiseSpread, promiseSpread } from '#shared/optics/spread'
import { colourAtAngle, colourShown, type ColourShown } from './colour-shown'
import { aspecularOf } from './light-rig'
import type { Look } from './look'
import { zoneBench, type ZoneBench } from './zone-bench'
import { zoneStacks, type ZoneWish } from './zone-stacks'

export type { ZoneWish } from './zone-stacks'

/** One step on the way up in a zone. */
export interface CoatColour extends ColourShown {
  /** Null for the bare ground. */
  coatId: string | null
  /** Passes that lie here: of the paint as usually reduced. */
  passes: number
  /** Distance from the colour below, CIEDE2000. */
  change: number
}

/** What a zone will look like, and how it gets there. */
export interface ZoneColour {
  zone: ZoneName
  label: string
  /** The promise: seen straight on, lit from 45°, gloss excluded, in daylight unless wished otherwise. With flakes as the chosen light shows them. */
  promised: ColourShown
  /** What a largemouth bass's two cones take of it, flakes as at 45°; `verdictOn` compares two. */
  cones: BassCatch
  /** Only where flakes lie: toward the gloss, and far from it. */
  face?: ColourShown
  flop?: ColourShown
  /** The ground first, then every coat that leaves a trace here. Flakes are read at 45°. */
  wayUp: CoatColour[]
}

/** A zone and how sure its promise is. */
export type ZoneSpread = readonly [zone: ZoneName, spread: PromiseSpread]

/**
 * The promised colour of every zone: numbers of the engine, not pixels of a picture. What an edit leaves as it was is not worked out again.
 *
 * @param bench keeps what it measured from one call to the next
 */
export function zoneColours(look: Look, wish: ZoneWish, bench: ZoneBench = zoneBench()): ZoneColour[] {
  const { seen, zones } = zoneStacks(look, wish, bench)
  const angle = aspecularOf(wish.light)
  return zones.map(({ zone, label, here, stack, quick, keys }): ZoneColour => {
    const ids = here.map(({ laid }) => laid.coat.id)
    return bench.colours([zone, label, angle, ...ids, ...keys].join(' | '), () => {
      const { promised, wayUp, ...light } = quickPromise(stack, quick, seen, (count, cut, work) => bench.photons([cut, ...keys.slice(0, count + 1)].join(' | '), work))
      return {
        zone, label,
        wayUp: wayUp.map((shown, i): CoatColour => ({
          ...colourShown(shown),
          coatId: ids[i - 1] ?? null,
          passes: stack.coats[i - 1]?.passes ?? 0,
          change: i === 0 ? 0 : deltaE2000(shown.lab, wayUp[i - 1]!.lab),
        })),
        promised: colourAtAngle(promised, angle, seen),
        cones: bassCatchIn(light, seen),
        ...(promised.face && promised.flop ? { face: colourShown(promised.face), flop: colourShown(promised.flop) } : {}),
      }
    })
  })
}

/**
 * How sure the promise of every zone is, zone by zone: a thread can hear what came meanwhile after each. At 45° where flakes lie;
 * words call coats by their numbers in the scheme.
 *
 * @param bench keeps what it measured, and what it worked out of stacks that come again
 */
export function* zoneSpreads(look: Look, wish: ZoneWish, bench: ZoneBench = zoneBench()): Generator<undefined, ZoneSpread[], undefined> {
  const { seen, zones } = zoneStacks(look, wish, bench)
  const spreads: ZoneSpread[] = []
  for (const { zone, here, stack, quick, keys } of zones) {
    const numbers = here.map(({ laid }) => laid.number)
    let isNew = false
    spreads.push([zone, bench.spreads([...numbers, ...keys].join(' | '), () => {
      isNew = true
      return promiseSpread(stack, seen, numbers, quick)
    })])
    if (isNew) yield
  }
  return spreads
}
