import { labFromXyz } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { trialStack } from './trial-stack'

/** How an engine did beside another on a small stack. */
export interface Trial {
  /** How far its light was from the other's, CIEDE2000. */
  most: number
  mean: number
  /** What an edit took it, and the other, ms. */
  ms: number
  knownMs: number
}

/** What engines agree within, CIEDE2000. */
const MOST = 0.5
const MEAN = 0.1
/** Samples between two that are compared. */
const EVERY = 23
/** Edits of a trial at most; it ends after the first that has taken so long, ms. */
const EDITS = 3
const LONG = 150

/** Gives an engine and one that is known the same small stack, then the same few edits of its middle coat. */
export function engineTrial(engine: PictureEngine, known: PictureEngine): Trial {
  const { kit, ask } = trialStack()
  // The first picture is for getting ready.
  const first = ask(0)
  const difference = differenceOf(engine.light(kit, first), known.light(kit, first))
  let ms = Infinity, knownMs = Infinity
  for (let edit = 1, taken = 0; edit <= EDITS && taken < LONG; edit++) {
    const edited = ask(edit)
    const times = [engine, known].map(each => timed(() => each.light(kit, edited))) as [number, number] // two of two
    ms = Math.min(ms, times[0])
    knownMs = Math.min(knownMs, times[1])
    taken += times[0] + times[1]
  }
  return { ...difference, ms, knownMs }
}

/** Whether an engine that did so is worth choosing. */
export function isWorthwhile({ most, mean, ms, knownMs }: Trial): boolean {
  return most <= MOST && mean <= MEAN && ms < knownMs
}

function timed(work: () => unknown): number {
  const since = performance.now()
  work()
  return performance.now() - since
}

function differenceOf(light: Float32Array, right: Float32Array): { most: number, mean: number } {
  let sum = 0, most = 0, count = 0
  for (let at = 0; at < right.length; at += 3 * EVERY) {
    const apart = deltaE2000(labAt(light, at), labAt(right, at))
    // No number at all is the greatest difference there is.
    most = Number.isNaN(apart) ? Infinity : Math.max(most, apart)
    sum += apart
    count++
  }
  return { most, mean: sum / count }
}

function labAt(light: Float32Array, at: number) {
  return labFromXyz(xyzFromLinearRgb([light[at]!, light[at + 1]!, light[at + 2]!]))
}
