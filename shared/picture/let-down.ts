import type { ZoneName } from '#shared/blank/zone-names'
import { deltaE2000 } from '#shared/optics/delta-e'
import { groundFromLab } from '#shared/optics/known-film'
import { promise, type Coat } from '#shared/optics/stack'
import { passStrength } from '#shared/scheme/pass-strength'
import { colourShown, type ColourShown } from './colour-shown'
import type { Look } from './look'
import { finishShown, shownCoats } from './shown-coats'
import { zoneBench, type ZoneBench } from './zone-bench'

/** One step of a let-down: what a zone would look like with so many passes of a coat. */
export interface LetDownStep extends ColourShown {
  passes: number
  /** Distance from one pass fewer, CIEDE2000: where it falls below what is seen, more paint changes nothing. */
  change: number
}

/** A zone that a coat hardly reaches shows what the coat would do there at full strength, not nothing. */
const REACHED = 0.05

/**
 * Colours at 0, 1 … `passesMost` passes of one coat over its present ground in a zone, later coats left off.
 *
 * @returns empty when the coat is not in the look, or has nothing in its cup
 */
export function letDown(look: Look, coatId: string, zone: ZoneName, passesMost: number, clear: boolean, bench: ZoneBench = zoneBench()): LetDownStep[] {
  const wish = { upTo: coatId, clear }
  const coats = shownCoats(look, wish)
  const top = coats.at(-1)
  if (top?.laid.coat.id !== coatId) return []

  const below = coats.slice(0, -1).map((coat): Coat => ({ optics: coat.paint, passes: coat.passes * bench.share(look, coat, zone) }))
  const there = bench.share(look, top, zone)
  const perPass = passStrength(top.laid.coat, look.materials) * (there > REACHED ? there : 1)
  const ground = groundFromLab(look.body.ground.colour, look.body.ground.finish)
  const finish = finishShown(look, wish)
  const steps = Array.from({ length: passesMost + 1 }, (_, passes) => {
    return colourShown(promise({ ground, finish, coats: [...below, { optics: top.paint, passes: passes * perPass }] }))
  })
  return steps.map((step, passes) => ({
    ...step, passes, change: passes === 0 ? 0 : deltaE2000(step.lab, steps[passes - 1]!.lab),
  }))
}
