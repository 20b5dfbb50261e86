import type { ZoneName } from '#shared/blank/zone-names'
import { ASPECULAR } from '#shared/optics/flake-angles'
import { groundFromLab } from '#shared/optics/known-film'
import { type QuickCoat, quickCoat } from '#shared/optics/quick-eye'
import { type ExactSeen, exactSeen } from '#shared/optics/seen-exact'
import { DAYLIGHT_IN_AIR } from '#shared/optics/seen-key'
import type { SeenWish } from '#shared/optics/seen-wish'
import type { Coat, Stack } from '#shared/optics/stack'
import type { Look } from './look'
import type { PictureOptions } from './picture-options'
import { finishShown, type ShownCoat, shownCoats } from './shown-coats'
import type { ZoneBench } from './zone-bench'

/** What of a look decides its promised colours. */
export type ZoneWish = Pick<PictureOptions, 'upTo' | 'clear' | 'light'> & {
  /** What it is seen by; daylight in air when left out. */
  seen?: SeenWish | undefined
}

/** What lies in a zone, worked out coat by coat. */
export interface ZoneStack {
  zone: ZoneName
  label: string
  /** The coats that leave a trace here, from the ground up, as the look has them and as the engine takes them. */
  here: readonly ShownCoat[]
  stack: Stack
  quick: readonly QuickCoat[]
  /** Says all of the ground and of what it is seen by, and then of each coat: joined, of the whole stack. */
  keys: readonly string[]
}

/** Fewer passes than this leave no trace. */
const TRACE = 0.01

/** The stacks of every zone, and what they are seen by. */
export function zoneStacks(look: Look, wish: ZoneWish, bench: ZoneBench): { seen: ExactSeen, zones: ZoneStack[] } {
  const ground = groundFromLab(look.body.ground.colour, look.body.ground.finish)
  const finish = finishShown(look, wish)
  const seen = exactSeen(wish.seen ?? DAYLIGHT_IN_AIR)
  const shown = shownCoats(look, wish).map(coat => ({ coat, name: bench.nameOf(coat.paint) }))
  const under = `${seen.key} ${finish} ${bench.nameOf(look.body.ground)}`
  const zones = bench.zones(look).map(({ zone, label }): ZoneStack => {
    const here = shown
      .map(({ coat, name }) => ({ coat, name, passes: coat.passes * bench.share(look, coat, zone) }))
      .filter(({ passes }) => passes > TRACE)
    const coats = here.map(({ coat, passes }): Coat => ({ optics: coat.paint, passes }))
    const keys = here.map(({ name, passes }) => `${name}×${passes}`)
    return {
      zone, label, here: here.map(({ coat }) => coat), stack: { ground, finish, coats }, keys: [under, ...keys],
      // Against water flakes bend light otherwise than against air.
      quick: coats.map((coat, i) => bench.coats(`${seen.surface.index} ${keys[i]!}`, () => quickCoat(coat, seen, ASPECULAR))),
    }
  })
  return { seen, zones }
}
