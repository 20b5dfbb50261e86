import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { engineTrial, isWorthwhile } from './engine-trial'
import { isSoftware, type EngineCanvas } from './open-context'
import { sparedEngine } from './spared-engine'
import { webgl2Engine } from './webgl2-engine'

/**
 * The engine on the graphics processor, where it is worth choosing: on no software that plays a graphics processor, in agreement
 * with a known engine on a small stack, and faster at it. The known one stands by for whatever it cannot paint.
 *
 * @returns undefined where it is not worth it; takes up to a quarter of a second
 */
export function offerWebgl2(known: PictureEngine, canvas?: EngineCanvas): PictureEngine | undefined {
  const engine = webgl2Engine(canvas)
  if (!engine) return undefined
  try {
    if (!isSoftware(engine.renderer) && isWorthwhile(engineTrial(engine, known))) return sparedEngine(engine, known)
  }
  catch {
    // A graphics processor that cannot even do this is none we could use.
  }
  engine.close()
  return undefined
}
