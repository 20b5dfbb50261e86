import { ref, type Ref } from 'vue'
import { type BenchClock, benchTime, type ClockDoubt, type ClockReading, readClock, setByServer, settleDoubt, startClock } from '~/bench/bench-clock'
import { benchDevice, readNote, writeNote } from '~/bench/device/bench-device'

/** How often the clock is read while the page runs: what is shown is never further off than this, ms. */
const READ_MS = 200

/** The time at the bench, on this page. */
export interface UseBenchClock {
  /** Now, ms; goes on by itself. */
  now: Readonly<Ref<number>>
  /** A jump ahead nobody could explain; null while there is none. */
  doubt: Readonly<Ref<ClockDoubt | null>>
  /** Reads the clock at once. */
  read: () => number
  /** The server said its time between two readings of this tablet's wall clock. */
  heard: (server: string, asked: number, answered: number) => void
  /** Settles a doubt. */
  settle: (what: ClockDoubt['countedAs']) => void
}

/** The page's one clock. */
let current: UseBenchClock | undefined

/** The clock of this page, started at the first use. Only in a browser. */
export function useBenchClock(): UseBenchClock {
  current ??= startBenchClock()
  return current
}

function startBenchClock(): UseBenchClock {
  const reading = (): ClockReading => ({ wall: Date.now(), running: performance.now() })
  let clock = startClock(0, reading())
  /** Seen by somebody since the last reading: a tablet that is sent to sleep hides its pages first. */
  let wasSeen = document.visibilityState === 'visible'
  const now = ref(benchTime(clock, Date.now()))
  const doubt = ref<ClockDoubt | null>(null)

  function take(next: BenchClock, isToKeep = next.offset !== clock.offset): number {
    clock = next
    doubt.value = clock.doubt
    now.value = benchTime(clock, Date.now())
    // Forgotten, the clock is learned anew from the server.
    if (isToKeep) benchDevice().then(device => writeNote(device, 'clock', { offset: clock.offset })).catch(() => undefined)
    return now.value
  }
  function read(): number {
    const next = readClock(clock, reading(), wasSeen)
    wasSeen = document.visibilityState === 'visible'
    return take(next)
  }

  benchDevice().then(async (device) => {
    const known = await readNote(device, 'clock')
    if (known && clock.offset === 0) take({ ...clock, offset: known.offset }, false)
  }).catch(() => undefined)
  window.setInterval(read, READ_MS)
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'hidden') wasSeen = false
    read()
  })
  document.addEventListener('freeze', () => {
    wasSeen = false
  })
  // A page that was frozen shows the time as it is, before anything else.
  for (const sign of ['resume', 'pageshow', 'focus']) window.addEventListener(sign, read, { capture: true })

  return {
    now: now,
    doubt: doubt,
    read,
    heard: (server, asked, answered) => void take(setByServer(clock, Date.parse(server), asked, answered)),
    settle: what => void take(settleDoubt(clock, what)),
  }
}
