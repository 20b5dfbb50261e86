import type { SaveState } from '~/composables/scheme/draft-keeper'
import type { SaveKind } from '~/components/ui/SaveState.vue'

/** How far saving has got, as the foot shows it: a drawing and words, with the time of the day it was saved. */
export function saveShown(state: SaveState, timeOf: (at: string) => string): { kind: SaveKind, words?: string, at?: string } {
  switch (state.is) {
    case 'saved': return { kind: 'saved', at: timeOf(state.at) }
    case 'saving': return { kind: 'saving' }
    case 'on this device': return { kind: 'kept', words: 'No network, kept on this device' }
    case 'cannot save': return { kind: 'not-saved', words: `Not saved: ${state.because}` }
    case 'conflict': return { kind: 'changed' }
  }
}
