import type { BassCatch } from '#shared/optics/bass-eyes'
import { bassCatchOf } from '#shared/optics/bass-map'
import { deltaE2000 } from '#shared/optics/delta-e'
import { groundFromLab } from '#shared/optics/known-film'
import { exactSeen } from '#shared/optics/seen-exact'
import { DAYLIGHT_IN_AIR } from '#shared/optics/seen-key'
import type { SeenWish } from '#shared/optics/seen-wish'
import { type PromiseSpread, promiseSpread } from '#shared/optics/spread'
import { coloursOnTheWayUp, promise, type Coat } from '#shared/optics/stack'
import type { ZoneName } from '#shared/blank/zone-names'
import { colourAtAngle, colourShown, type ColourShown } from './colour-shown'
import { aspecularOf } from './light-rig'
import type { Look } from './look'
import type { PictureOptions } from './picture-options'
import { finishShown, shownCoats } from './shown-coats'
import { zoneBench, type ZoneBench } from './zone-bench'

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
  /** How sure it is: at 45° where flakes lie. Its words call coats by their numbers in the scheme. */
  spread: PromiseSpread
  /** What a largemouth bass's two cones take of it, flakes as at 45°; `verdictOn` compares two. */
  cones: BassCatch
  /** Only where flakes lie: toward the gloss, and far from it. */
  face?: ColourShown
  flop?: ColourShown
  /** The ground first, then every coat that leaves a trace here. Flakes are read at 45°. */
  wayUp: CoatColour[]
}

/** Fewer passes than this leave no trace. */
const TRACE = 0.01

/** What of a look decides its promised colours. */
export type ZoneWish = Pick<PictureOptions, 'upTo' | 'clear' | 'light'> & {
  /** What it is seen by; daylight in air when left out. */
  seen?: SeenWish | undefined
}

/**
 * The promised colour of every zone: numbers of the engine, not pixels of a picture.
 *
 * @param bench keeps what it measured from one call to the next
 */
export function zoneColours(look: Look, wish: ZoneWish, bench: ZoneBench = zoneBench()): ZoneColour[] {
  const { colour } = look.body.ground
  const ground = groundFromLab(colour, look.body.ground.finish)
  const finish = finishShown(look, wish)
  const coats = shownCoats(look, wish)
  const seen = exactSeen(wish.seen ?? DAYLIGHT_IN_AIR)
  return bench.zones(look).map(({ zone, label }): ZoneColour => {
    const here = coats
      .map(coat => ({ coat, passes: coat.passes * bench.share(look, coat, zone) }))
      .filter(({ passes }) => passes > TRACE)
    const stack = { ground, finish, coats: here.map(({ coat, passes }): Coat => ({ optics: coat.paint, passes })) }
    const promised = promise(stack, seen)
    const wayUp = coloursOnTheWayUp(stack, seen).map((shown, i, all): CoatColour => ({
      ...colourShown(shown),
      coatId: here[i - 1]?.coat.laid.coat.id ?? null,
      passes: here[i - 1]?.passes ?? 0,
      change: i === 0 ? 0 : deltaE2000(shown.lab, all[i - 1]!.lab),
    }))
    return {
      zone, label, wayUp,
      promised: colourAtAngle(promised, aspecularOf(wish.light), seen),
      cones: bassCatchOf(stack, seen),
      spread: promiseSpread(stack, seen, here.map(({ coat }) => coat.laid.number)),
      ...(promised.face && promised.flop ? { face: colourShown(promised.face), flop: colourShown(promised.flop) } : {}),
    }
  })
}
