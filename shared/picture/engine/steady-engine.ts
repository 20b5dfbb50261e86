import type { PictureEngine } from './picture-engine'

/**
 * One engine out of several, best first: whichever fails, by a trap or for want of memory, the next one works out the same light
 * again, and stays. Only what the last cannot do either is an error.
 */
export function steadyEngine(engines: readonly [PictureEngine, ...PictureEngine[]]): PictureEngine {
  let left: readonly PictureEngine[] = engines
  return {
    get name() {
      return left[0]!.name // one is always left
    },
    light(kit, ask) {
      const failed: PictureEngine[] = []
      for (const engine of left) {
        try {
          const light = engine.light(kit, ask)
          for (const each of failed) each.close()
          left = left.slice(failed.length)
          return light
        }
        catch (error) {
          failed.push(engine)
          if (failed.length === left.length) throw error
        }
      }
      throw new RangeError('An engine is needed to work out light.')
    },
    close() {
      for (const engine of left) engine.close()
    },
  }
}
