import { computed, type ComputedRef, type Ref } from 'vue'
import { createDraftKeeper, type KeeperPorts, type SaveFailure, type SaveState } from './draft-keeper'
import { type DraftShelf, openingOf } from './kept-draft'
import type { DraftConflict, OpenDraft, TakenIn } from '~/stores/scheme-draft'
import { explain } from '~/errors/explain'
import { problemOf } from '~/errors/problem-of'
import { Problem } from '#shared/errors/problem'
import { applyEdit, editField, type SchemeEdit, editWords } from '#shared/scheme/edits'
import { type History, record, redo, startHistory, undo } from '#shared/scheme/history'
import { type Choices, mergeBodies } from '#shared/scheme/merge-bodies'
import { rebaseHistory, settleHistory } from '#shared/scheme/merge-history'
import { takenInWords } from '#shared/scheme/merge-words'
import { sameValue } from '#shared/scheme/canonical'
import { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import type { DraftSavedView, RevisionView, SchemeView } from '#shared/scheme/scheme-view'

/** How many sends without an answer are remembered. */
const SENT_MAX = 20
const CHOOSE_FIRST = 'Somebody else changed the same things meanwhile. Choose between the two first.'
const STILL_OPENING = 'This draft is still being opened. Try again in a moment.'
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
  /** Ends a conflict by what was chosen for each clash; undo brings the other side back. */
  settle: (choices: Choices) => void
  /** What last came in from somebody else by itself, since it clashed with nothing of one's own; null before that. */
  takenIn: Readonly<Ref<TakenIn | null>>
  /** Word came that this version was saved, here or elsewhere. */
  heard: (version: number) => void
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

/** What keeping a draft needs from the device; without a shelf it keeps nothing. */
export interface DevicePorts { openShelf: () => Promise<DraftShelf>, later: KeeperPorts['later'] }

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
export function workOnDraft(scheme: SchemeView, draft: OpenDraft, ports: DraftPorts, mayChange: boolean): SchemeDraft & { start: (device: DevicePorts) => Promise<void> } {
  const { history, materials, saveState, conflict, takenIn } = draft
  const present = () => history.value.present
  const take = (body: SchemeBody, words: string) => {
    history.value = record(history.value, body, { words, field: null, at: ports.now() })
  }
  const changed = () => draft.keeper?.change(present())

  /** Goes on from what the server has: `present` is saved on top of it, unless it is the same. */
  function goOnFrom(theirs: SchemeView) {
    draft.base = theirs.draft
    draft.sent = []
    // The blank drawn on belongs to the body on the page.
    materials.value = theirs.draft.blankId === present().blankId ? theirs.materials : { ...theirs.materials, blank: materials.value.blank }
    const isSaved = sameValue(theirs.draft, asStored(present()))
    draft.keeper?.settle(theirs.version, isSaved ? null : present(), theirs.savedAt)
  }

  /** Makes one of what is on the page and what the server has, both made from `base`; where both changed one thing, a person chooses. */
  function meet(theirs: SchemeView, base: SchemeBody | null) {
    const mine = present()
    // Only the name or the fish changed, or what arrived is one's own save whose answer got lost.
    const isKnown = [...base ? [base] : [], ...draft.sent, mine].some(known => sameValue(theirs.draft, asStored(known)))
    if (isKnown) return goOnFrom(theirs)
    const { body, clashes } = mergeBodies(base, mine, theirs.draft)
    if (clashes.length > 0) {
      conflict.value = { base, mine, theirs }
      draft.keeper?.hold(mine)
      return
    }
    history.value = base ? rebaseHistory(history.value, base, theirs.draft) : startHistory(body)
    takenIn.value = { by: theirs.savedBy?.name ?? null, words: takenInWords(mine, body, theirs.materials) }
    goOnFrom(theirs)
  }

  async function send(unsaved: SchemeBody, version: number): Promise<DraftSavedView> {
    draft.sent = [...draft.sent.filter(each => each !== unsaved), unsaved].slice(-SENT_MAX)
    const saved = await ports.save(unsaved, version)
    draft.base = unsaved
    draft.sent = []
    return saved
  }

  async function start({ openShelf, later }: DevicePorts) {
    const shelf = openShelf()
    const keeper = createDraftKeeper(scheme.version, {
      send,
      failure: (error) => {
        draft.failed = error
        return failureOf(error)
      },
      keep: async (unsaved, version) => (await shelf).write(scheme.id, { version, base: draft.base, isUnsaved: unsaved !== null, history: { ...history.value, past: [...history.value.past], future: [...history.value.future], last: null } }),
      reconcile: async () => meet(await ports.readScheme(), draft.base),
      onState: (state) => {
        saveState.value = state
      },
      later,
    })
    draft.keeper = keeper
    // A device that keeps nothing takes only the safety net, never the work on the page.
    const kept = mayChange ? await shelf.then(open => open.read(scheme.id)).catch(() => null) : null
    draft.isOpening.value = false
    const opening = openingOf({ version: scheme.version, body: scheme.draft }, kept, sameValue)
    switch (opening.is) {
      case 'as saved':
        return
      case 'history':
        history.value = opening.kept.history
        if (opening.kept.isUnsaved) goOnFrom(scheme)
        return
      case 'unsaved':
        if (opening.kept.history.past.length > 0) history.value = opening.kept.history
        else take(opening.kept.history.present, 'Take up unsaved work')
        changed()
        return
      case 'behind':
        history.value = opening.kept.history
        meet(scheme, opening.kept.base)
    }
  }

  /** Saves everything or throws what stood in the way: nothing older than the page may be published. */
  async function saveAll() {
    await draft.keeper?.flush()
    if (draft.keeper?.isUnsaved()) throw draft.failed ?? new Problem({ code: 'scheme/changed-meanwhile', version: draft.keeper.version() })
  }

  function step(next: History) {
    if (conflict.value || draft.isOpening.value || !mayChange) return
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
      if (draft.isOpening.value) return STILL_OPENING
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
      const seen = takenIn.value
      await saveAll()
      const version = draft.keeper?.version() ?? scheme.version
      // Nobody freezes what they have not looked at.
      if (takenIn.value !== seen) throw new Problem({ code: 'scheme/changed-meanwhile', version })
      try {
        return await ports.publish(note, version)
      }
      catch (error) {
        const problem = problemOf(error)
        if (problem?.code === 'scheme/changed-meanwhile') draft.keeper?.heard(problem.version)
        throw error
      }
    },
    async restore(number) {
      if (!mayChange) throw new Problem({ code: 'auth/not-allowed', action: 'scheme:change' })
      const revision = await ports.readRevision(number)
      take(revision.body, `Restore revision ${number}`)
      changed()
      await saveAll()
    },
    settle(choices) {
      const two = conflict.value
      if (!two) return
      conflict.value = null
      history.value = settleHistory(history.value, two.base, two.theirs.draft, choices)
      goOnFrom(two.theirs)
    },
    takenIn,
    heard: version => draft.keeper?.heard(version),
    saveNow: async () => draft.keeper?.flush(),
    async refreshMaterials() {
      const { blankId } = present()
      const read = await ports.readMaterials(blankId)
      // A blank chosen meanwhile has its own materials on the way.
      if (present().blankId === blankId) materials.value = read
    },
    start,
  }
}
