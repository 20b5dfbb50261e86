// What a person at the terminal reads while things are set up.

/** A step that cannot go on, with a sentence on how to mend it. */
export class Halt extends Error {
  /**
   * @param {string} message what failed
   * @param {string} [remedy] what the person can do about it
   */
  constructor(message, remedy) {
    super(message)
    this.name = 'Halt'
    this.remedy = remedy
  }
}

/** @param {string} text */
export function say(text) {
  process.stdout.write(`${text}\n`)
}

/** @param {number} since from `Date.now()` */
export const secondsSince = since => `${((Date.now() - since) / 1000).toFixed(1)} s`

const STILL_EVERY_MS = 20_000

/**
 * Says what begins, that it still goes on, and how long it took.
 * @template T
 * @param {string} what in the present: `Building the application`
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(what, work) {
  const since = Date.now()
  say(`· ${what}`)
  const still = setInterval(() => say(`  … ${what} (${secondsSince(since)})`), STILL_EVERY_MS)
  try {
    const result = await work()
    say(`  done: ${what} (${secondsSince(since)})`)
    return result
  }
  finally {
    clearInterval(still)
  }
}

/**
 * Says why things stopped; a stack only when it is not one of our own refusals.
 * @param {unknown} error
 */
export function sayFailure(error) {
  if (error instanceof Halt) {
    process.stderr.write(`\n✗ ${error.message}\n${error.remedy ? `  → ${error.remedy}\n` : ''}`)
    return
  }
  process.stderr.write(`\n✗ ${error instanceof Error ? error.stack ?? error.message : String(error)}\n`)
  if (error instanceof Error && error.cause) process.stderr.write(`  because: ${error.cause instanceof Error ? error.cause.message : error.cause}\n`)
}
