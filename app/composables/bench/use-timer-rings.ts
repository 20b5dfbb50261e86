import { onMounted, ref, type Ref, watch } from 'vue'
import type { RunTimer } from '#shared/bench/run-timers'
import { timerLeft } from '#shared/bench/run-timers'

/** Calls `ring` once for each timer that ends while the page is open; those that had ended before stay silent. */
export function useTimerRings(timers: Readonly<Ref<readonly RunTimer[]>>, now: Ref<number>, ring: (ended: RunTimer[]) => void): void {
  const rung = new Set<string>()
  const isOpen = ref(false)
  const ended = () => timers.value.filter(timer => timerLeft(timer, now.value) === 0 && !rung.has(timer.eventId))

  onMounted(() => {
    now.value = Date.now()
    for (const timer of ended()) rung.add(timer.eventId)
    isOpen.value = true
  })
  watch([timers, now], () => {
    if (!isOpen.value) return
    const fresh = ended()
    if (fresh.length === 0) return
    for (const timer of fresh) rung.add(timer.eventId)
    ring(fresh)
  })
}
