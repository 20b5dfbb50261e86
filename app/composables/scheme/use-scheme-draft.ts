import { type ComputedRef, type Ref, computed, onBeforeUnmount, onMounted, watch } from 'vue'
import { createDraftKeeper, type SaveFailure, type SaveState } from './draft-keeper'
import { draftShelf, openingOf } from './kept-draft'
import { type DraftConflict, openDraft, useSchemeDraftStore } from '~/stores/scheme-draft'
import { useSession } from '~/composables/people/use-session'
import { explain } from '~/errors/explain'
import { problemOf } from '~/errors/problem-of'
import { applyEdit, editField, type SchemeEdit, editWords } from '#shared/scheme/edits'
import { type History, record, redo, startHistory, undo } from '#shared/scheme/history'
import { sameValue } from '#shared/scheme/canonical'
import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import type { DraftSavedView, RevisionView, SchemeView } from '#shared/scheme/scheme-view'

const CHOOSE_FIRST = 'Somebody else saved this scheme meanwhile. Choose one of the two versions first.'

/** The draft on the page: the body as the painter has it now, saved by itself. */
export interface SchemeDraft {
  body: ComputedRef<SchemeBody>
  /** Every paint on the shelf and the blank's shape: what any change can be drawn with at once. */
  materials: Readonly<Ref<Materials>>
  saveState: Readonly<Ref<SaveState>>
  /** Does one edit at once; a sentence when it cannot be done, null when it is done. */
  do: (edit: SchemeEdit) => string | null
  undo: () => void
  redo: () => void
  canUndo: ComputedRef<boolean>
  canRedo: ComputedRef<boolean>
  /** What undo would take back and redo would do again, in words; null when there is nothing. */
  undoWords: ComputedRef<string | null>
  redoWords: ComputedRef<string | null>
  /** Saves what is unsaved, then freezes the draft as the next revision. */
  publish: (note: string) => Promise<RevisionView>
  /** Makes an older revision the draft again; undo brings the present one back. */
  restore: (number: number) => Promise<void>
  /** Another person's version beside one's own; null while there is no such thing. */
  conflict: Readonly<Ref<DraftConflict | null>>
  /** Ends a conflict with one of the two versions; undo brings the other back. */
  settle: (keep: 'mine' | 'theirs') => void
  /** Sends what is unsaved now. */
  saveNow: () => Promise<void>
  /** The shelf or the blank may have changed: reads the materials again. */
  refreshMaterials: () => Promise<void>
}

/** Opens a scheme's draft. Needs the scheme as `useScheme` read it; called in the set-up of the component that shows it. */
export function useSchemeDraft(scheme: SchemeView): SchemeDraft {
  const store = import.meta.client ? useSchemeDraftStore() : null
  const { session } = useSession()
  const found = store?.find(scheme.id)
  const draft = found && (found.keeper?.isUnsaved() || found.keeper?.version() === scheme.version) ? found : openDraft(scheme)
  store?.put(scheme.id, draft)
  const { history, materials, saveState, conflict } = draft

  const body = computed(() => history.value.present)

  function changed() {
    draft.keeper?.change(history.value.present)
  }

  function takeOver(theirs: SchemeBody, words: string) {
    history.value = record(history.value, theirs, { words, field: null, at: Date.now() })
  }

  function failure(error: unknown): SaveFailure {
    const problem = problemOf(error)
    if (problem?.code === 'scheme/changed-meanwhile') return { why: 'changed meanwhile' }
    const because = explain(error)
    return problem === null || problem.code === 'server/failed' ? { why: 'no connection', because } : { why: 'refused', because }
  }

  async function readConflict() {
    try {
      const theirs: SchemeView = await $fetch(`/api/schemes/${scheme.id}`)
      const mine = history.value.present
      if (sameValue(theirs.draft, mine)) draft.keeper?.settle(theirs.version, null, theirs.savedAt)
      // Only the name or the fish changed: the coats are as they were when this work began.
      else if (sameValue(theirs.draft, draft.base)) draft.keeper?.settle(theirs.version, mine, theirs.savedAt)
      else conflict.value = { mine, theirs }
    }
    catch {
      // No connection for their version now: nothing is sent or lost; the next try reads it.
    }
  }

  async function send(unsaved: SchemeBody, version: number): Promise<DraftSavedView> {
    const saved: DraftSavedView = await $fetch(`/api/schemes/${scheme.id}/draft`, { method: 'PUT', body: { body: unsaved }, headers: { 'if-match': `"v${version}"` } })
    draft.base = unsaved
    return saved
  }

  function startKeeping() {
    const shelf = draftShelf(window.localStorage, session.value?.person.id ?? 'nobody')
    draft.keeper = createDraftKeeper(scheme.version, {
      send,
      failure,
      keep: (unsaved, version) => shelf.write(scheme.id, { version, body: unsaved }),
      forget: () => shelf.remove(scheme.id),
      onConflict: () => void readConflict(),
      onState: (state) => {
        saveState.value = state
      },
      later: (ms, run) => {
        const timer = window.setTimeout(run, ms)
        return () => window.clearTimeout(timer)
      },
    })
    const opening = openingOf({ version: scheme.version, body: scheme.draft }, shelf.read(scheme.id), sameValue)
    if (opening.is === 'as saved') shelf.remove(scheme.id)
    else if (opening.is === 'conflict') {
      draft.keeper.hold(opening.mine)
      conflict.value = { mine: opening.mine, theirs: scheme }
    }
    else {
      takeOver(opening.body, 'Take up unsaved work')
      changed()
    }
  }

  async function refreshMaterials() {
    materials.value = await $fetch(`/api/schemes/${scheme.id}/materials`, { query: { blankId: body.value.blankId } })
  }

  watch(() => body.value.blankId, (blankId) => {
    if (import.meta.client && blankId !== materials.value.blank.id) void refreshMaterials()
  })

  /** Sends what is unsaved; where a conflict could not be read before, reads it now. */
  async function saveNow() {
    if (saveState.value.is === 'conflict' && !conflict.value) await readConflict()
    await draft.keeper?.flush()
  }
  const keepNow = () => draft.keeper?.keepNow()
  const sendNow = () => void saveNow()

  onMounted(() => {
    if (!draft.keeper) startKeeping()
    window.addEventListener('pagehide', keepNow)
    window.addEventListener('online', sendNow)
  })
  onBeforeUnmount(() => {
    window.removeEventListener('pagehide', keepNow)
    window.removeEventListener('online', sendNow)
    sendNow()
  })

  function step(next: History) {
    if (conflict.value) return
    history.value = next
    changed()
  }

  return {
    body,
    materials,
    saveState,
    conflict,
    do(edit) {
      if (conflict.value) return CHOOSE_FIRST
      const outcome = applyEdit(history.value.present, edit)
      if (!outcome.ok) return outcome.because
      history.value = record(history.value, outcome.body, { words: editWords(history.value.present, edit), field: editField(edit), at: Date.now() })
      changed()
      return null
    },
    undo: () => step(undo(history.value)),
    redo: () => step(redo(history.value)),
    canUndo: computed(() => history.value.past.length > 0),
    canRedo: computed(() => history.value.future.length > 0),
    undoWords: computed(() => history.value.past.at(-1)?.words ?? null),
    redoWords: computed(() => history.value.future[0]?.words ?? null),
    async publish(note) {
      await draft.keeper?.flush()
      return $fetch(`/api/schemes/${scheme.id}/revisions`, { method: 'POST', body: { note }, headers: { 'if-match': `"v${draft.keeper?.version() ?? scheme.version}"` } })
    },
    async restore(number) {
      const revision: RevisionView = await $fetch(`/api/schemes/${scheme.id}/revisions/${number}`)
      takeOver(revision.body, `Restore revision ${number}`)
      changed()
      await draft.keeper?.flush()
    },
    settle(keep) {
      const two = conflict.value
      if (!two) return
      conflict.value = null
      materials.value = two.theirs.materials
      draft.base = two.theirs.draft
      // Both versions stay within reach: the one not kept is one undo away.
      if (keep === 'theirs') {
        history.value = record(startHistory(two.mine), two.theirs.draft, { words: 'Take the other version', field: null, at: Date.now() })
        draft.keeper?.settle(two.theirs.version, null, two.theirs.savedAt)
      }
      else {
        history.value = record(startHistory(two.theirs.draft), two.mine, { words: 'Keep my version', field: null, at: Date.now() })
        draft.keeper?.settle(two.theirs.version, two.mine, two.theirs.savedAt)
      }
    },
    saveNow,
    refreshMaterials,
  }
}
