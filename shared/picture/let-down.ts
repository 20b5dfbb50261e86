import type { ZoneName } from '#shared/blank/zone-names'
import { deltaE2000 } from '#shared/optics/delta-e'
import { groundFromLab } from '#shared/optics/known-film'
import { exactSeen } from '#shared/optics/seen-exact'
import { DAYLIGHT_IN_AIR } from '#shared/optics/seen-key'
import type { SeenWish } from '#shared/optics/seen-wish'
import { type PromiseSpread, promiseSpread } from '#shared/optics/spread'
import { promise, type Coat } from '#shared/optics/stack'
import { passStrength } from '#shared/scheme/pass-strength'
import { colourShown, type ColourShown } from './colour-shown'
import type { Look } from './look'
import { finishShown, shownCoats } from './shown-coats'
import { zoneBench, type ZoneBench } from './zone-bench'

/** Which coat is let down, where, and what it is seen by. */
export interface LetDownWish {
  coatId: string
  zone: ZoneName
  /** The steps go from none to so many passes. */
  passesMost: number
  /** The step whose promise is asked how sure it is. */
  chosen: number
  clear: boolean
  /** Daylight in air when left out. */
  seen?: SeenWish | undefined
}

/** One step of a let-down: what a zone would look like with so many passes of a coat. */
export interface LetDownStep extends ColourShown {
  passes: number
  /** Distance from one pass fewer, CIEDE2000: where it falls below what is seen, more paint changes nothing. */
  change: number
}

/** Colours of one coat over its present ground in a zone, pass by pass. */
export interface LetDown {
  steps: LetDownStep[]
  /** How sure the chosen step is; undefined when there is none. */
  spread: PromiseSpread | undefined
  /** Least and most passes that typically come out no farther from the chosen step than it may be off itself. */
  alike: readonly [number, number] | undefined
}

/** A zone that a coat hardly reaches shows what the coat would do there at full strength, not nothing. */
const REACHED = 0.05
/** Below this nobody sees a difference, CIEDE2000, however sure a promise is. */
const UNSEEN = 1

/**
 * Colours at 0, 1 … `passesMost` passes of one coat over its present ground in a zone, later coats left off.
 *
 * @returns no steps when the coat is not in the look, or has nothing in its cup
 */
export function letDown(look: Look, { coatId, zone, passesMost, chosen, clear, seen: by }: LetDownWish, bench: ZoneBench = zoneBench()): LetDown {
  const wish = { upTo: coatId, clear }
  const coats = shownCoats(look, wish)
  const top = coats.at(-1)
  if (top?.laid.coat.id !== coatId) return { steps: [], spread: undefined, alike: undefined }

  const seen = exactSeen(by ?? DAYLIGHT_IN_AIR)
  const below = coats.slice(0, -1)
    .map(coat => ({ number: coat.laid.number, optics: coat.paint, passes: coat.passes * bench.share(look, coat, zone) }))
    .filter(({ passes }) => passes > 0)
  const there = bench.share(look, top, zone)
  const perPass = passStrength(top.laid.coat, look.materials) * (there > REACHED ? there : 1)
  const ground = groundFromLab(look.body.ground.colour, look.body.ground.finish)
  const finish = finishShown(look, wish)
  const stackOf = (passes: number) => ({ ground, finish, coats: [...below, { optics: top.paint, passes: passes * perPass }] satisfies Coat[] })
  const shown = Array.from({ length: passesMost + 1 }, (_, passes) => colourShown(promise(stackOf(passes), seen)))
  const steps = shown.map((step, passes) => ({
    ...step, passes, change: passes === 0 ? 0 : deltaE2000(step.lab, shown[passes - 1]!.lab),
  }))

  const now = steps[chosen]
  if (!now || chosen === 0) return { steps, spread: undefined, alike: undefined }
  const stack = stackOf(chosen)
  const spread = promiseSpread(stack, seen, [...below.map(({ number }) => number), top.laid.number])
  return { steps, spread, alike: alikeRound(steps, chosen, Math.max(UNSEEN, spread.typical)) }
}

/** The steps on both sides of one that are no farther from it than this. */
function alikeRound(steps: readonly LetDownStep[], chosen: number, within: number): readonly [number, number] {
  const isNear = (passes: number) => deltaE2000(steps[passes]!.lab, steps[chosen]!.lab) <= within
  let [from, to] = [chosen, chosen]
  while (from > 1 && isNear(from - 1)) from--
  while (to < steps.length - 1 && isNear(to + 1)) to++
  return [from, to]
}
