import { defineStore } from 'pinia'
import { ref, type Ref, type ShallowRef, shallowReactive, shallowRef } from 'vue'
import type { DraftKeeper, SaveState } from '~/composables/scheme/draft-keeper'
import { type History, startHistory } from '#shared/scheme/history'
import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import type { SchemeView } from '#shared/scheme/scheme-view'

/** Two versions of a draft that changed the same things, between which the painter chooses. */
export interface DraftConflict {
  /** What both began with; null when that is not known. */
  base: SchemeBody | null
  mine: SchemeBody
  theirs: SchemeView
}

/** What somebody else saved and what came in from it, as sentences; `by` is null for somebody who left. */
export interface TakenIn { by: string | null, words: readonly string[] }

/** A draft that is being worked on, with what can be undone; outlives the page it is shown on. */
export interface OpenDraft {
  history: ShallowRef<History>
  materials: ShallowRef<Materials>
  saveState: ShallowRef<SaveState>
  conflict: ShallowRef<DraftConflict | null>
  takenIn: ShallowRef<TakenIn | null>
  /** What the device kept is still being read: nothing can be changed yet. */
  isOpening: Ref<boolean>
  /** The body the server had last: what unsaved work was made from. */
  base: SchemeBody
  /** Bodies sent since then without an answer: any of them may have arrived. */
  sent: readonly SchemeBody[]
  /** What a save was last refused with. */
  failed: unknown
  /** Saves it; null on the server and until the page has come alive. */
  keeper: DraftKeeper | null
}

/** A draft as the server gave it, with nothing to undo. */
export function openDraft(scheme: SchemeView): OpenDraft {
  return {
    history: shallowRef(startHistory(scheme.draft)),
    materials: shallowRef(scheme.materials),
    saveState: shallowRef<SaveState>({ is: 'saved', at: scheme.savedAt }),
    conflict: shallowRef<DraftConflict | null>(null),
    takenIn: shallowRef<TakenIn | null>(null),
    isOpening: ref(true),
    base: scheme.draft,
    sent: [],
    failed: null,
    keeper: null,
  }
}

/** Open drafts by scheme. Lives in the browser only: a server answering many people must hold none. */
export const useSchemeDraftStore = defineStore('scheme-draft', () => {
  const drafts = shallowReactive(new Map<string, OpenDraft>())

  return {
    find: (schemeId: string) => drafts.get(schemeId),
    put: (schemeId: string, draft: OpenDraft) => {
      drafts.set(schemeId, draft)
    },
    drop: (schemeId: string) => {
      drafts.get(schemeId)?.keeper?.stop()
      drafts.delete(schemeId)
    },
    /** Whether any draft holds work the server does not have. */
    hasUnsaved: () => [...drafts.values()].some(draft => draft.keeper?.isUnsaved() ?? false),
  }
})
