/** Lets one sleep until there is something to do. What rings while nobody sleeps ends the next sleep at once. */
export interface Alarm {
  ring: () => void
  /** Until it rings, this many ms have passed, or the signal ends it. */
  sleep: (ms: number) => Promise<void>
}

/** An alarm for as long as a signal lasts. */
export function createAlarm(signal: AbortSignal): Alarm {
  let isRung = false
  let wake: () => void = () => undefined
  return {
    ring() {
      isRung = true
      wake()
    },
    async sleep(ms) {
      await new Promise<void>((resolve) => {
        if (isRung || signal.aborted) return resolve()
        const timer = setTimeout(() => wake(), ms)
        wake = () => {
          clearTimeout(timer)
          signal.removeEventListener('abort', wake)
          resolve()
        }
        signal.addEventListener('abort', wake)
      })
      isRung = false
    },
  }
}
