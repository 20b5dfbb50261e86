import { computed, type ComputedRef, type Ref, ref, shallowRef, type ShallowRef } from 'vue'
import { api } from '~/composables/api/api'
import { problemOf } from '~/errors/problem-of'
import type { CardDraft, CardView } from '#shared/cards/card'
import { type Clash, draftOf, mergeDrafts, sameDraft } from '#shared/cards/merge-drafts'

/** How often a save is tried again over what others saved meanwhile on other lines. */
const TRIES = 3

/** What somebody else saved on lines that were changed here too. */
export interface CardClash { readonly saved: CardView, readonly lines: readonly Clash[] }

/** How a save ended: done, done together with lines others changed, or waiting for a choice. */
export type SaveEnd = { end: 'saved', with: readonly Clash[] } | { end: 'clash' }

/** A card being written: what is typed, what is saved, and what to do when somebody else saved meanwhile. */
export interface CardOnDesk {
  draft: Ref<CardDraft>
  isDirty: ComputedRef<boolean>
  /** Null while nobody else is in the way. */
  clash: ShallowRef<CardClash | null>
  /** Saves what is typed; throws when it is refused for another reason than somebody else. */
  save: () => Promise<SaveEnd>
  /** The card was changed by an act of ours, such as sharing it: what is typed stays. */
  goOnFrom: (card: CardView) => void
}

/** Works on a card; `card` follows what is saved. */
export function useCardDraft(card: Ref<CardView | null>): CardOnDesk {
  const start = card.value
  const draft = ref<CardDraft>(draftOf(start ?? { title: '', words: '', fish: '', sizes: '', price: '', leadTime: '', photoIds: [], showsChips: true }))
  const clash = shallowRef<CardClash | null>(null)
  const isDirty = computed(() => card.value !== null && !sameDraft(card.value, draft.value))

  async function save(): Promise<SaveEnd> {
    const together: Clash[] = []
    for (let tries = 1; ; tries++) {
      const base = card.value
      if (!base) return { end: 'saved', with: [] }
      const sent = draftOf(draft.value)
      try {
        const saved = await api('/api/cards/:cardId', { params: { cardId: base.id }, method: 'PUT', body: sent, headers: { 'if-match': `"v${base.version}"` } })
        // What was typed while it was sent is the next change.
        if (sameDraft(sent, draft.value)) draft.value = draftOf(saved)
        card.value = saved
        clash.value = null
        return { end: 'saved', with: together }
      }
      catch (error) {
        if (problemOf(error)?.code !== 'card/changed-meanwhile' || tries === TRIES) throw error
        const saved = await api('/api/cards/:cardId', { params: { cardId: base.id } })
        const { draft: merged, clashes, theirs } = mergeDrafts(base, draft.value, saved)
        card.value = saved
        draft.value = draftOf(merged)
        together.push(...theirs)
        if (clashes.length > 0) {
          clash.value = { saved, lines: clashes }
          return { end: 'clash' }
        }
      }
    }
  }

  function goOnFrom(changed: CardView) {
    const { draft: merged, clashes } = mergeDrafts(card.value ?? changed, draft.value, changed)
    card.value = changed
    draft.value = draftOf(merged)
    if (clashes.length > 0) clash.value = { saved: changed, lines: clashes }
  }

  return { draft, isDirty, clash, save, goOnFrom }
}
