import { onMounted, type Ref, shallowRef, type ShallowRef, watch } from 'vue'
import { useIntervalFn } from '@vueuse/core'
import { benchDevice, readNote, writeNote } from '~/bench/device/bench-device'
import { type RunTimer, timerLeft } from '#shared/bench/run-timers'

/** Until somebody has seen it, a timer rings again after this time, ms, so many times. */
const AGAIN_MS = 15_000
const TIMES_MOST = 8
/** So many of the last rings are remembered. */
const REMEMBERED = 200

/** Timers that ring. */
export interface TimerRings {
  /** Those that have ended and that nobody has seen yet. */
  ringing: ShallowRef<readonly RunTimer[]>
  /** Somebody has seen them. */
  heard: () => void
}

/**
 * Rings once for each timer that ends, also for one that ended while this tablet slept or was off; what ended before the run
 * was brought to this tablet stays silent. A timer whose pieces have gone on rings no more.
 */
export function useTimerRings(timers: Readonly<Ref<readonly RunTimer[]>>, now: Readonly<Ref<number>>, { since, ring }: { since: number, ring: (ended: readonly RunTimer[]) => void }): TimerRings {
  const ringing = shallowRef<readonly RunTimer[]>([])
  let rung: ReadonlySet<string> | null = null
  let times = 0
  const nameOf = (timer: RunTimer) => `${timer.eventId} ${timer.whole}`

  function look() {
    if (rung === null) return
    const known = rung
    const fresh = timers.value.filter(timer => timerLeft(timer, now.value) === 0 && timer.endsAt >= since && !known.has(nameOf(timer)))
    const open = new Set(timers.value.map(nameOf))
    const still = ringing.value.filter(timer => open.has(nameOf(timer)))
    if (fresh.length === 0) {
      if (still.length < ringing.value.length) ringing.value = still
      return
    }
    rung = new Set([...known, ...fresh.map(nameOf)])
    ringing.value = [...still, ...fresh]
    times = 0
    ring(fresh)
    const remembered = [...rung].slice(-REMEMBERED)
    // Forgotten, a timer rings once too often.
    benchDevice().then(device => writeNote(device, 'rung', remembered)).catch(() => undefined)
  }

  onMounted(async () => {
    const known = await benchDevice().then(device => readNote(device, 'rung')).catch(() => undefined)
    rung = new Set(known ?? [])
    look()
  })
  watch([timers, now], look)
  useIntervalFn(() => {
    if (ringing.value.length > 0 && ++times < TIMES_MOST) ring(ringing.value)
  }, AGAIN_MS)
  return {
    ringing,
    heard() {
      ringing.value = []
    },
  }
}
