import type { IconName } from '~/components/ui/icons'

/** One thing said in passing, and the way to take it back where there is one. */
export interface Toast {
  readonly id: number
  readonly words: string
  readonly icon: IconName
  readonly undo?: { readonly word: string, readonly act: () => void }
}

/** How long a toast stays: longer where it can be taken back. */
const STAYS_MS = 6_000
const STAYS_WITH_UNDO_MS = 10_000

const timers = new Map<number, ReturnType<typeof setTimeout>>()

/** Says things once at the lower left; a toast under the pointer or holding the focus stays. Only for the browser. */
export function useToast() {
  const toasts = useState<Toast[]>('toasts', () => [])
  const count = useState('toast-count', () => 0)

  function drop(id: number) {
    hold(id)
    toasts.value = toasts.value.filter(toast => toast.id !== id)
  }
  function hold(id: number) {
    clearTimeout(timers.get(id))
    timers.delete(id)
  }
  function release(id: number) {
    const toast = toasts.value.find(one => one.id === id)
    if (!toast) return
    hold(id)
    timers.set(id, setTimeout(() => drop(id), toast.undo ? STAYS_WITH_UNDO_MS : STAYS_MS))
  }
  function say(words: string, options: { icon?: IconName, undo?: Toast['undo'] } = {}) {
    const id = ++count.value
    toasts.value = [...toasts.value.slice(-2), { id, words, icon: options.icon ?? (options.undo ? 'take-back' : 'saved'), undo: options.undo }]
    release(id)
  }
  function takeBack(id: number) {
    toasts.value.find(toast => toast.id === id)?.undo?.act()
    drop(id)
  }
  return { toasts, say, drop, hold, release, takeBack }
}
