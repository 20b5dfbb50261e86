import { type Ref, ref } from 'vue'
import { useEventListener } from '@vueuse/core'

/** Files dropped anywhere on the page or pasted into it go to `take`; whether some are held over the page now. */
export function useDroppedFiles(take: (files: File[]) => void): Ref<boolean> {
  const isOver = ref(false)
  if (import.meta.server) return isOver
  let depth = 0
  const over = (by: number) => {
    depth = by === 0 ? 0 : Math.max(0, depth + by)
    isOver.value = depth > 0
  }

  useEventListener(window, 'dragenter', event => carriesFiles(event.dataTransfer) && over(1))
  useEventListener(window, 'dragleave', event => carriesFiles(event.dataTransfer) && over(-1))
  useEventListener(window, 'dragover', (event) => {
    if (carriesFiles(event.dataTransfer)) event.preventDefault()
  })
  useEventListener(window, 'drop', (event) => {
    if (!carriesFiles(event.dataTransfer)) return
    event.preventDefault()
    over(0)
    take([...event.dataTransfer?.files ?? []])
  })
  useEventListener(window, 'paste', (event) => {
    const files = [...event.clipboardData?.files ?? []]
    // Words copied together with a picture of them are meant as words where one writes.
    if (files.length === 0 || (isWriting(event.target) && event.clipboardData?.types.includes('text/plain'))) return
    event.preventDefault()
    take(files)
  })
  return isOver
}

function carriesFiles(carried: DataTransfer | null): boolean {
  return carried?.types.includes('Files') ?? false
}

function isWriting(place: EventTarget | null): boolean {
  return place instanceof HTMLInputElement || place instanceof HTMLTextAreaElement
}
