import { onMounted, ref, type Ref } from 'vue'
import { useEventListener, useWakeLock } from '@vueuse/core'

/** Keeps this screen awake while the page is open; says whether the device allows it, null until it is known. */
export function useAwake(): Readonly<Ref<boolean | null>> {
  const { isSupported, request } = useWakeLock()
  const isAwake = ref<boolean | null>(null)

  async function stayAwake() {
    try {
      if (!isSupported.value) throw new Error('no wake lock')
      await request('screen')
      isAwake.value = true
    }
    catch {
      isAwake.value = false
    }
  }
  onMounted(stayAwake)
  useEventListener(document, 'visibilitychange', () => {
    if (document.visibilityState === 'visible') void stayAwake()
  })
  return isAwake
}
