import { useSession } from '~/composables/people/use-session'

/** Whoever is signed out is asked to sign in; whoever is in no workshop can only choose one. Public pages ask nothing. */
export default defineNuxtRouteMiddleware(async (to) => {
  if (to.meta.public) return
  const { session, isKnown, refresh } = useSession()
  if (!isKnown.value) await refresh()
  if (!session.value) return navigateTo({ path: '/sign-in', query: to.fullPath === '/' ? {} : { back: to.fullPath } })
  if (!session.value.workshop && to.path !== '/me') return navigateTo('/me')
})
