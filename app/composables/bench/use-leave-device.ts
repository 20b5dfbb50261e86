import type { Ref } from 'vue'
import { emptyDevice, onlyHere } from '~/bench/device/empty-device'

/** The question before somebody signs out of a tablet that holds what nobody else has. */
export interface LeaveDevice {
  /** How much would be lost; null while nothing is asked. */
  asked: Ref<number | null>
  /** Empties what is private from this device; false when somebody would rather stay. */
  leave: () => Promise<boolean>
  answer: (isLeaving: boolean) => void
}

/** Whoever waits for the answer. */
let waiting: ((isLeaving: boolean) => void) | undefined

/** Asks, when something still waits, before what is private is emptied from this device. */
export function useLeaveDevice(): LeaveDevice {
  const asked = useState<number | null>('leaving-device', () => null)

  function answer(isLeaving: boolean): void {
    asked.value = null
    waiting?.(isLeaving)
    waiting = undefined
  }
  return {
    asked,
    answer,
    async leave() {
      // A device without drawers has nothing in them.
      const count = await onlyHere().catch(() => 0)
      if (count > 0) {
        const isLeaving = await new Promise<boolean>((resolve) => {
          waiting = resolve
          asked.value = count
        })
        if (!isLeaving) return false
      }
      await emptyDevice().catch(() => undefined)
      return true
    },
  }
}
