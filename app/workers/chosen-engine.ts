import { offerWebgl2 } from './webgl2/offer-webgl2'
import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { simdEngine } from '#shared/picture/engine/simd-engine'
import { steadyEngine } from '#shared/picture/engine/steady-engine'

/** The engine of this machine. */
export interface ChosenEngine {
  engine: PictureEngine
  /** Tries the graphics processor, and goes over to it where it is worth it. Takes a moment: for when there is nothing to paint. */
  tryGraphics: () => void
}

/** Chooses by what the machine has: vectors or not at once, so that the first picture waits for nothing; then its graphics processor. */
export function chosenEngine(): ChosenEngine {
  const vectors = simdEngine()
  const known = vectors ? steadyEngine([vectors, plainEngine()]) : plainEngine()
  let current = known
  let isTried = false
  return {
    engine: {
      get name() {
        return current.name
      },
      light: (kit, ask) => current.light(kit, ask),
      close: () => {
        current.close()
        known.close()
      },
    },
    tryGraphics() {
      if (isTried) return
      isTried = true
      current = offerWebgl2(known) ?? known
    },
  }
}
