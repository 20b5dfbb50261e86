import type { z } from 'zod'
import { api } from '~/composables/api/api'
import type { Acceptance } from '#shared/people/invitation'
import type { SessionView } from '#shared/people/session'
import type { SignUp } from '#shared/people/workshop'
import { useSession } from './use-session'

/** Everything that can be done before one is signed in; each throws when it is refused. */
export interface Door {
  signIn: (tried: { email: string, password: string }) => Promise<void>
  askForWorkshop: (email: string) => Promise<void>
  openWorkshop: (token: string, wanted: z.input<typeof SignUp>) => Promise<void>
  askForPassword: (email: string) => Promise<void>
  setPassword: (token: string, password: string) => Promise<void>
  accept: (token: string, acceptance: z.input<typeof Acceptance>) => Promise<void>
}

/** The ways in: by password, and by the links of letters. */
export function useDoor(): Door {
  const { session, isKnown } = useSession()

  function enter(entered: SessionView) {
    session.value = entered
    isKnown.value = true
    clearNuxtData()
  }

  return {
    async signIn(tried) {
      enter(await api('/api/sign-in', { method: 'POST', body: tried }))
    },
    async askForWorkshop(email) {
      await api('/api/sign-up', { method: 'POST', body: { email } })
    },
    async openWorkshop(token, wanted) {
      enter(await api('/api/sign-up/:token', { params: { token }, method: 'POST', body: wanted }))
    },
    async askForPassword(email) {
      await api('/api/password/forgot', { method: 'POST', body: { email } })
    },
    async setPassword(token, password) {
      await api('/api/password/reset/:token', { params: { token }, method: 'POST', body: { password } })
    },
    async accept(token, acceptance) {
      enter(await api('/api/invitations/by-link/:token', { params: { token }, method: 'POST', body: acceptance }))
    },
  }
}
