import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import type { Webgl2Engine } from './webgl2-engine'

/**
 * The graphics processor with another engine standing by: what it cannot paint now the other paints, so that no picture is
 * missing. As soon as the machine gives it back it paints again; after an error of its own it is let go of.
 *
 * @param spare lives on when this is closed
 */
export function sparedEngine(engine: Webgl2Engine, spare: PictureEngine): PictureEngine {
  let isDone = false
  return {
    /** Of the one that would paint now. */
    get name() {
      return isDone || engine.isLost() ? spare.name : engine.name
    },
    light(kit, ask) {
      if (isDone || engine.isLost()) return spare.light(kit, ask)
      try {
        return engine.light(kit, ask)
      }
      catch (error) {
        // A view too large for its textures says nothing of the next one.
        if (!engine.isLost() && !(error instanceof RangeError)) {
          isDone = true
          engine.close()
        }
        return spare.light(kit, ask)
      }
    },
    close() {
      isDone = true
      engine.close()
    },
  }
}
