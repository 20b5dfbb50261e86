import { api } from '~/composables/api/api'
import { problemOf } from '~/errors/problem-of'
import type { CardByLink } from '#shared/cards/card'

/** The card behind a link; null when the link is unknown or was taken back, which look the same. */
export async function usePublicCard(token: string): Promise<CardByLink | null> {
  const event = useRequestEvent()
  // A customer is given no cookie: not even the one that keeps a choice of light.
  if (event) useNuxtApp().hook('app:rendered', () => event.node.res.removeHeader('set-cookie'))
  const { data, error } = await useAsyncData('card by link', () => readCard(token), { deep: false })
  if (error.value) throw createError({ statusCode: 500, fatal: true })
  if (event) {
    // Revoked is gone: nobody keeps a copy of the page, neither on the way nor at the customer's.
    event.node.res.setHeader('cache-control', 'private, no-store')
    if (!data.value) setResponseStatus(event, 404)
  }
  return data.value ?? null
}

async function readCard(token: string): Promise<CardByLink | null> {
  try {
    return await api('/api/cards/by-link/:token', { params: { token } })
  }
  catch (error) {
    const code = problemOf(error)?.code
    // A token too long to be one is as unknown as any other.
    if (code === 'card/not-found' || code === 'input/invalid') return null
    throw error
  }
}
