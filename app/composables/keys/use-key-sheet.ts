import { useLocalStorage } from '@vueuse/core'
import type { Ref } from 'vue'

/** The list of keys: whether it is open, and whether ? opens it. */
export interface KeySheet { open: Ref<boolean>, /** A person can turn the bare sign off: speech input might press it by accident. */ byKey: Ref<boolean> }

/** The list of keys of the screen, wherever it is opened from. */
export function useKeySheet(): KeySheet {
  return {
    open: useState('keys open', () => false),
    byKey: useLocalStorage('countershade.keys-by-sign', true, { initOnMounted: true }),
  }
}
