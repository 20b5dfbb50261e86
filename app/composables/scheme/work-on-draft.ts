import { computed, type ComputedRef, type Ref } from 'vue'
import { createDraftKeeper, type KeeperPorts, type SaveFailure, type SaveState } from './draft-keeper'
import { type DraftShelf, openingOf } from './kept-draft'
import type { DraftConflict, OpenDraft } from '~/stores/scheme-draft'
import { explain } from '~/errors/explain'
import { problemOf } from '~/errors/problem-of'
import { Problem } from '#shared/errors/problem'
import { applyEdit, editField, type SchemeEdit, editWords } from '#shared/scheme/edits'
import { type History, record, redo, startHistory, undo } from '#shared/scheme/history'
import { sameValue } from '#shared/scheme/canonical'
import { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import type { DraftSavedView, RevisionView, SchemeView } from '#shared/scheme/scheme-view'

/** How many sends without an answer are remembered. */
const SENT_MAX = 20
const CHOOSE_FIRST = 'Somebody else saved this scheme meanwhile. Choose one of the two versions first.'
const READ_ONLY = 'Your role in this workshop reads recipes and does not change them. Ask a painter.'

/** The draft on the page: the body as the painter has it now, saved by itself. */
export interface SchemeDraft {
  body: ComputedRef<SchemeBody>
  /** Every paint on the shelf and the blank's shape: what any change can be drawn with at once. */
  materials: Readonly<Ref<Materials>>
  saveState: Readonly<Ref<SaveState>>
  /** Whether the role includes changing schemes; without it every edit is refused. */
  mayChange: boolean
  /** Does one edit at once; a sentence when it cannot be done, null when it is done. */
  do: (edit: SchemeEdit) => string | null
  undo: () => void
  redo: () => void
  canUndo: ComputedRef<boolean>
  canRedo: ComputedRef<boolean>
  /** What undo would take back and redo would do again, in words; null when there is nothing. */
  undoWords: ComputedRef<string | null>
  redoWords: ComputedRef<string | null>
  /** Saves what is unsaved, then freezes the draft as the next revision; throws when either is refused. */
  publish: (note: string) => Promise<RevisionView>
  /** Makes an older revision the draft again; undo brings the present one back. */
  restore: (number: number) => Promise<void>
  /** Another person's version beside one's own; null while there is no such thing. */
  conflict: Readonly<Ref<DraftConflict | null>>
  /** Ends a conflict with one of the two versions; undo brings the other back. */
  settle: (keep: 'mine' | 'theirs') => void
  /** Sends what is unsaved now; where another person's version could not be read before, reads it. */
  saveNow: () => Promise<void>
  /** The shelf or the blank may have changed: reads the materials again. */
  refreshMaterials: () => Promise<void>
}

/** What work on a draft needs from the world. */
export interface DraftPorts {
  readScheme: () => Promise<SchemeView>
  readRevision: (number: number) => Promise<RevisionView>
  readMaterials: (blankId: string) => Promise<Materials>
  save: (body: SchemeBody, version: number) => Promise<DraftSavedView>
  publish: (note: string, version: number) => Promise<RevisionView>
  now: () => number
}

/** What keeping a draft needs from the device. */
export interface DevicePorts { shelf: DraftShelf, later: KeeperPorts['later'] }

/** A body as the server keeps it: spaces round names taken off. */
function asStored(body: SchemeBody): SchemeBody {
  return SchemeBody.safeParse(body).data ?? body
}

function failureOf(error: unknown): SaveFailure {
  const problem = problemOf(error)
  if (problem?.code === 'scheme/changed-meanwhile') return { why: 'changed meanwhile' }
  const because = explain(error)
  return problem === null || problem.code === 'server/failed' ? { why: 'no connection', because } : { why: 'refused', because }
}

/** Work on one open draft. `start` begins to keep and save it: once, in a browser. */
export function workOnDraft(scheme: SchemeView, draft: OpenDraft, ports: DraftPorts, mayChange: boolean): SchemeDraft & { start: (device: DevicePorts) => void } {
  const { history, materials, saveState, conflict } = draft
  const present = () => history.value.present
  const take = (body: SchemeBody, words: string) => {
    history.value = record(history.value, body, { words, field: null, at: ports.now() })
  }
  const changed = () => draft.keeper?.change(present())

  /** Goes on from the server's version where nobody's work is at stake; null when a person has to choose. */
  function onward(theirs: SchemeView): SchemeBody | 'nothing' | null {
    if (sameValue(theirs.draft, asStored(present()))) return 'nothing'
    // Only the name or the fish changed, or what arrived is one's own save whose answer got lost.
    const isKnown = [draft.base, ...draft.sent].some(known => sameValue(theirs.draft, asStored(known)))
    return isKnown ? present() : null
  }

  async function readConflict() {
    try {
      const theirs = await ports.readScheme()
      const unsaved = onward(theirs)
      if (unsaved === null) {
        conflict.value = { mine: present(), theirs }
        return
      }
      draft.base = theirs.draft
      draft.keeper?.settle(theirs.version, unsaved === 'nothing' ? null : unsaved, theirs.savedAt)
    }
    catch {
      // No connection for their version now: nothing is sent or lost; the next try reads it.
    }
  }

  async function send(unsaved: SchemeBody, version: number): Promise<DraftSavedView> {
    draft.sent = [...draft.sent.filter(each => each !== unsaved), unsaved].slice(-SENT_MAX)
    const saved = await ports.save(unsaved, version)
    draft.base = unsaved
    draft.sent = []
    return saved
  }

  function start({ shelf, later }: DevicePorts) {
    const keeper = createDraftKeeper(scheme.version, {
      send,
      failure: (error) => {
        draft.failed = error
        return failureOf(error)
      },
      keep: (body, version) => shelf.write(scheme.id, { version, body }),
      forget: () => shelf.remove(scheme.id),
      onConflict: () => void readConflict(),
      onState: (state) => {
        saveState.value = state
      },
      later,
    })
    draft.keeper = keeper
    const opening = mayChange ? openingOf({ version: scheme.version, body: scheme.draft }, shelf.read(scheme.id), sameValue) : { is: 'as saved' as const }
    switch (opening.is) {
      case 'as saved':
        shelf.remove(scheme.id)
        return
      case 'conflict':
        keeper.hold(opening.mine)
        conflict.value = { mine: opening.mine, theirs: scheme }
        return
      case 'unsaved':
        take(opening.body, 'Take up unsaved work')
        changed()
    }
  }

  /** Saves everything or throws what stood in the way: nothing older than the page may be published. */
  async function saveAll() {
    await draft.keeper?.flush()
    if (draft.keeper?.isUnsaved()) throw draft.failed ?? new Problem({ code: 'scheme/changed-meanwhile', version: draft.keeper.version() })
  }

  function step(next: History) {
    if (conflict.value || !mayChange) return
    history.value = next
    changed()
  }

  return {
    body: computed(present),
    materials,
    saveState,
    conflict,
    mayChange,
    do(edit) {
      if (!mayChange) return READ_ONLY
      if (conflict.value) return CHOOSE_FIRST
      const outcome = applyEdit(present(), edit)
      if (!outcome.ok) return outcome.because
      history.value = record(history.value, outcome.body, { words: editWords(present(), edit), field: editField(edit), at: ports.now() })
      changed()
      return null
    },
    undo: () => step(undo(history.value)),
    redo: () => step(redo(history.value)),
    canUndo: computed(() => mayChange && history.value.past.length > 0),
    canRedo: computed(() => mayChange && history.value.future.length > 0),
    undoWords: computed(() => history.value.past.at(-1)?.words ?? null),
    redoWords: computed(() => history.value.future[0]?.words ?? null),
    async publish(note) {
      await saveAll()
      return ports.publish(note, draft.keeper?.version() ?? scheme.version)
    },
    async restore(number) {
      if (!mayChange) throw new Problem({ code: 'auth/not-allowed', action: 'scheme:change' })
      const revision = await ports.readRevision(number)
      take(revision.body, `Restore revision ${number}`)
      changed()
      await saveAll()
    },
    settle(keep) {
      const two = conflict.value
      if (!two) return
      conflict.value = null
      materials.value = two.theirs.materials
      draft.base = two.theirs.draft
      // Both versions stay within reach: the one not kept is one undo away.
      history.value = startHistory(keep === 'mine' ? two.theirs.draft : two.mine)
      take(keep === 'mine' ? two.mine : two.theirs.draft, keep === 'mine' ? 'Keep my version' : 'Take the other version')
      draft.keeper?.settle(two.theirs.version, keep === 'mine' ? two.mine : null, two.theirs.savedAt)
    },
    async saveNow() {
      if (saveState.value.is === 'conflict' && !conflict.value) await readConflict()
      await draft.keeper?.flush()
    },
    async refreshMaterials() {
      const { blankId } = present()
      const read = await ports.readMaterials(blankId)
      // A blank chosen meanwhile has its own materials on the way.
      if (present().blankId === blankId) materials.value = read
    },
    start,
  }
}
