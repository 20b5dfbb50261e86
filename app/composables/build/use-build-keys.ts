import { useScreenKeys } from '~/composables/keys/use-keys'
import type { SchemeDraft } from '~/composables/scheme/use-scheme-draft'

/** Undo and redo from the keyboard, but for where somebody types and undoes letters. */
export function useBuildKeys(draft: Pick<SchemeDraft, 'undo' | 'redo'>): void {
  useScreenKeys({
    place: 'Scheme',
    keys: [
      { press: ['Mod+Z'], words: 'Undo', run: () => draft.undo() },
      { press: ['Mod+Shift+Z', 'Mod+Y'], words: 'Redo', run: () => draft.redo() },
    ],
  })
}
