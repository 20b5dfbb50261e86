import { useEventListener } from '@vueuse/core'
import type { SchemeDraft } from '~/composables/scheme/use-scheme-draft'

/** Undo and redo from the keyboard, but for where somebody types and undoes letters. */
export function useBuildKeys(draft: Pick<SchemeDraft, 'undo' | 'redo'>): void {
  useEventListener(() => import.meta.client ? window : null, 'keydown', (event: KeyboardEvent) => {
    if (!(event.ctrlKey || event.metaKey) || event.altKey || event.key.toLowerCase() !== 'z') return
    const { target } = event
    const types = target instanceof HTMLTextAreaElement || (target instanceof HTMLInputElement && !['radio', 'checkbox', 'range'].includes(target.type))
    if (types || document.querySelector('dialog[open]')) return
    event.preventDefault()
    if (event.shiftKey) draft.redo()
    else draft.undo()
  })
}
