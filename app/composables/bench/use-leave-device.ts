import type { Ref } from 'vue'
import { emptyDevice, onlyHere } from '~/bench/device/empty-device'
import { draftsOnlyHere, leaveDrafts } from '~/composables/scheme/empty-drafts'

/** What lies on this device and nowhere else: steps and photos of the bench, and drafts with unsaved work. */
export interface OnlyHere { steps: number, drafts: number }

/** The question before somebody signs out of a tablet that holds what nobody else has. */
export interface LeaveDevice {
  /** How much would be lost; null while nothing is asked. */
  asked: Ref<OnlyHere | null>
  /** Empties what is private from this device; false when somebody would rather stay. */
  leave: () => Promise<boolean>
  answer: (isLeaving: boolean) => void
}

/** Whoever waits for the answer. */
let waiting: ((isLeaving: boolean) => void) | undefined

/** Asks, when something still waits, before what is private is emptied from this device. */
export function useLeaveDevice(): LeaveDevice {
  const asked = useState<OnlyHere | null>('leaving-device', () => null)

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
      const [steps, drafts] = await Promise.all([onlyHere().catch(() => 0), draftsOnlyHere().catch(() => 0)])
      if (steps + drafts > 0) {
        const isLeaving = await new Promise<boolean>((resolve) => {
          waiting = resolve
          asked.value = { steps, drafts }
        })
        if (!isLeaving) return false
      }
      await Promise.all([emptyDevice().catch(() => undefined), leaveDrafts().catch(() => undefined)])
      return true
    },
  }
}
