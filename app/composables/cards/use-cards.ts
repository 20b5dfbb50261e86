import { computed, type ComputedRef, type Ref } from 'vue'
import { api, useApi } from '~/composables/api/api'
import type { CardView } from '#shared/cards/card'

const key = (schemeId?: string) => schemeId ? `cards of ${schemeId}` : 'cards'

/** Cards of the workshop, newest first; of one scheme when it is named. */
export async function useCards(schemeId?: string): Promise<{ cards: ComputedRef<readonly CardView[]>, error: Ref<unknown>, refresh: () => Promise<void> }> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(key(schemeId), () => request('/api/cards', { query: { schemeId } }), { deep: false })
  return { cards: computed(() => data.value ?? []), error, refresh: () => refresh() }
}

/** One card of the workshop. */
export async function useCard(cardId: string): Promise<{ card: Ref<CardView | null>, error: Ref<unknown>, refresh: () => Promise<void> }> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(`card ${cardId}`, () => request('/api/cards/:cardId', { params: { cardId } }), { deep: false })
  return {
    card: computed({
      get: () => data.value ?? null,
      set: (card) => {
        data.value = card ?? undefined
      },
    }),
    error,
    refresh: () => refresh(),
  }
}

/** What can be done with cards; each throws when it is refused. */
export function useCardActions() {
  return {
    /** Starts a card of a published scheme. */
    async start(schemeId: string): Promise<CardView> {
      // The key lets a request that is sent again on a bad line start one card, not two.
      const card = await api('/api/cards', { method: 'POST', body: { schemeId }, headers: { 'idempotency-key': crypto.randomUUID() } })
      await refreshNuxtData([key(), key(schemeId)])
      return card
    },
    share: (cardId: string): Promise<CardView> => api('/api/cards/:cardId/share', { params: { cardId }, method: 'POST', body: {} }),
    /** Takes blank and colours anew from the newest revision. */
    retell: (cardId: string): Promise<CardView> => api('/api/cards/:cardId/colours', { params: { cardId }, method: 'POST', body: {} }),
    revoke: (cardId: string): Promise<CardView> => api('/api/cards/:cardId/revoke', { params: { cardId }, method: 'POST', body: {} }),
    async remove(cardId: string): Promise<void> {
      await api('/api/cards/:cardId', { params: { cardId }, method: 'DELETE' })
    },
  }
}
