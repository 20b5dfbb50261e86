import { useSession } from '~/composables/people/use-session'
import { wayBack } from '~/composables/people/way-back'

/** Whoever is signed in already need not sign in: they go where they wanted. */
export default defineNuxtRouteMiddleware(async (to) => {
  const { session, isKnown, refresh } = useSession()
  if (!isKnown.value) await refresh()
  if (session.value) return navigateTo(wayBack(to.query.back), { replace: true })
})
