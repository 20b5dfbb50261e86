// A frame around everything that runs until somebody stops it: whatever was opened is closed, in reverse order.
import { stopAllPrograms } from './processes.mjs'
import { say, sayFailure } from './say.mjs'

/** What has to be closed again. */
export class Closing {
  /** @type {{ what: string, close: () => unknown }[]} */
  #open = []
  #isClosing = false

  /**
   * @param {string} what
   * @param {() => unknown} close
   */
  async add(what, close) {
    if (this.#isClosing) await close()
    else this.#open.push({ what, close })
  }

  /** Ends a set-up that goes on while we are already closing. */
  assertOpen() {
    if (this.#isClosing) throw new Error('stopped')
  }

  async close() {
    this.#isClosing = true
    for (const { what, close } of this.#open.splice(0).reverse()) {
      try {
        await close()
      }
      catch (error) {
        say(`  ${what} did not stop cleanly: ${error instanceof Error ? error.message : error}`)
      }
    }
    await stopAllPrograms()
  }
}

const SIGNALS = /** @type {const} */ ({ SIGINT: 130, SIGTERM: 143, SIGHUP: 129 })

/**
 * Runs `work` and then waits for what it returns, until that ends or a signal comes; closes everything and exits.
 * The exit code is that of `work`'s promise, 1 after a failure, and that of the signal when it cut the set-up short.
 * @param {(closing: Closing) => Promise<{ ended: Promise<number> }>} work
 */
export async function untilStopped(work) {
  const closing = new Closing()
  /** @type {Promise<keyof typeof SIGNALS>} */
  const stopped = new Promise((resolve) => {
    for (const signal of /** @type {(keyof typeof SIGNALS)[]} */ (Object.keys(SIGNALS))) process.on(signal, () => resolve(signal))
  })
  let code = 0
  try {
    const setUp = work(closing)
    const first = await Promise.race([setUp, stopped])
    if (typeof first === 'string') {
      code = SIGNALS[first]
      say('\nStopping before everything was up.')
      setUp.catch(() => undefined)
    }
    else {
      const outcome = await Promise.race([first.ended, stopped])
      if (typeof outcome === 'number') code = outcome
      else say('\nStopping.')
    }
  }
  catch (error) {
    sayFailure(error)
    code = 1
  }
  await closing.close()
  process.exit(code)
}
