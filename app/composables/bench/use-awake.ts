import { onMounted } from 'vue'
import { useEventListener, useWakeLock } from '@vueuse/core'

/** Keeps this screen awake while the page is open; `onCannot` is called once where the device does not allow it. */
export function useAwake(onCannot: () => void): void {
  const { isSupported, request } = useWakeLock()
  let isTold = false

  async function stayAwake() {
    try {
      if (!isSupported.value) throw new Error('no wake lock')
      await request('screen')
    }
    catch {
      if (!isTold) onCannot()
      isTold = true
    }
  }
  onMounted(stayAwake)
  if (import.meta.client) useEventListener(document, 'visibilitychange', () => {
    if (document.visibilityState === 'visible') void stayAwake()
  })
}
