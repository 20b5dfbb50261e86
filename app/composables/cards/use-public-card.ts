import type { CardByLink } from '#shared/cards/card'
import { problemOf } from '~/errors/problem-of'

/** The card behind a link; null when the link is unknown or was taken back, which look the same. */
export async function usePublicCard(token: string): Promise<CardByLink | null> {
  const event = useRequestEvent()
  // Revoked is gone: nobody keeps a copy of the page, neither on the way nor at the customer's.
  if (event) setResponseHeaderOf(event, 'cache-control', 'private, no-store')
  const { data, error } = await useAsyncData('card by link', () => $fetch(`/api/cards/by-link/${encodeURIComponent(token)}`), { deep: false })
  if (!error.value) return data.value ?? null
  const code = problemOf(error.value)?.code
  if (code !== 'card/not-found' && code !== 'input/invalid') throw createError({ statusCode: 500, fatal: true })
  clearNuxtData('card by link')
  error.value = undefined
  if (event) setResponseStatus(event, 404)
  return null
}

function setResponseHeaderOf(event: NonNullable<ReturnType<typeof useRequestEvent>>, name: string, value: string) {
  event.node.res.setHeader(name, value)
}
