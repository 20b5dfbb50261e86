import { useEventListener } from '@vueuse/core'
import { onBeforeUnmount, onMounted } from 'vue'
import { type Key, type KeyPlace, listPlace } from './key-list'
import { isPress, isWriting } from './key-press'

/** The key of a table that this press is for; undefined when it has none. */
export function keyFor<Given extends readonly unknown[]>(keys: readonly Key<Given>[], event: KeyboardEvent): Key<Given> | undefined {
  return keys.find(key => key.press.some(press => isPress(event, press)))
}

/** Does what a table has for a press. */
export function answer<Given extends readonly unknown[]>(keys: readonly Key<Given>[], event: KeyboardEvent, given: Given): void {
  const key = keyFor(keys, event)
  if (key && key.run(event, ...given) !== false) event.preventDefault()
}

function useListed<Given extends readonly unknown[]>(place: KeyPlace<Given>): void {
  let takeOff: (() => void) | undefined
  onMounted(() => {
    takeOff = listPlace(place)
  })
  onBeforeUnmount(() => takeOff?.())
}

/** Keys of something that holds the focus. What is listed and what the returned handler does are one and the same table. */
export function useKeys<Given extends readonly unknown[] = []>(place: KeyPlace<Given> & { on: string }): (event: KeyboardEvent, ...given: Given) => void {
  useListed(place)
  return (event, ...given) => {
    if (!isWriting(event.target)) answer(place.keys, event, given)
  }
}

/** Something that is dragged where nothing has keys of its own: only on the list, with the ways that lead there without dragging. */
export function useDrag(place: string, drag: NonNullable<KeyPlace['drag']>): void {
  useListed({ place, keys: [], drag })
}

/** Keys of a whole screen. They never work while somebody writes, or while a dialog asks something. */
export function useScreenKeys(place: Omit<KeyPlace, 'on' | 'drag'>): void {
  useListed(place)
  useEventListener(() => import.meta.client ? window : null, 'keydown', (event: KeyboardEvent) => {
    if (event.defaultPrevented || isWriting(event.target, !event.ctrlKey && !event.metaKey) || document.querySelector('dialog[open]')) return
    answer(place.keys, event, [])
  })
}
