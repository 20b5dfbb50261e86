import { computed, type Ref, ref } from 'vue'
import { LINE_WORDS, stateWords } from './card-words'
import { useCardDraft } from './use-card-draft'
import { useCardActions } from './use-cards'
import { useAttempt } from '~/composables/people/use-attempt'
import { useToast } from '~/composables/ui/use-toast'
import type { CardView } from '#shared/cards/card'

/** What the card asks before it does something that cannot be taken back. */
export type CardQuestion = 'share' | 'revoke' | 'remove'

/** A card on the desk: written, saved, shared, revoked, taken away. */
export function useCardDesk(card: Ref<CardView | null>) {
  const { draft, isDirty, clash, save, goOnFrom } = useCardDraft(card)
  const saving = useAttempt()
  const acting = useAttempt()
  const actions = useCardActions()
  const { say } = useToast()
  const question = ref<CardQuestion | null>(null)
  const isGone = ref(false)

  const state = computed(() => card.value ? stateWords(card.value) : null)
  const whyNotSaved = computed(() => {
    if (draft.value.title.trim() === '') return 'Give the card a title first.'
    return card.value?.state === 'shared' && draft.value.photoIds.length === 0 ? 'A shared card keeps a photo. Pick one, or revoke the link first.' : undefined
  })

  async function keep() {
    if (whyNotSaved.value) return
    await saving.attempt(async () => {
      const ended = await save()
      if (ended.end === 'clash') return
      const others = ended.with.map(line => LINE_WORDS[line].toLowerCase()).join(', ')
      say(others ? `Saved, together with what somebody else changed: ${others}` : card.value?.state === 'shared' ? 'Saved. Customers see it now' : 'Saved')
    })
  }

  function shared(changed: CardView) {
    goOnFrom(changed)
    say('Shared. Copy its link or write an e-mail', { icon: 'link' })
  }

  async function retell() {
    const id = card.value?.id
    if (!id) return
    const done = await acting.attempt(async () => goOnFrom(await actions.retell(id)))
    say(done ? 'Colours and blank are those of the newest revision' : acting.problem.value ?? 'It was not done', { icon: done ? 'saved' : 'note' })
  }

  async function revoke() {
    const id = card.value?.id
    if (!id || !await acting.attempt(async () => goOnFrom(await actions.revoke(id)))) return
    question.value = null
    say('Revoked. The link shows nothing any more', { icon: 'leave' })
  }

  async function remove() {
    const id = card.value?.id
    if (!id || !await acting.attempt(() => actions.remove(id))) return
    isGone.value = true
    question.value = null
    await navigateTo('/cards')
    say('Card taken away', { icon: 'leave' })
  }

  return { draft, isDirty: computed(() => isDirty.value && !isGone.value), clash, saving, acting, question, state, whyNotSaved, keep, shared, retell, revoke, remove }
}
