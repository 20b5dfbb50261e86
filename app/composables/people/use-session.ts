import type { Ref } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { useLeaveDevice } from '~/composables/bench/use-leave-device'
import type { SessionView } from '#shared/people/session'

/** Who is signed in here, and what can be done about it. */
export interface UseSession {
  /** Null for somebody signed out. */
  session: Ref<SessionView | null>
  /** Whether the server was asked already; until then `session` says nothing. */
  isKnown: Ref<boolean>
  refresh: () => Promise<void>
  signOut: () => Promise<void>
  changeWorkshop: (workshopId: string) => Promise<void>
}

/** The session of this page; asked for once, on the server, and carried over. */
export function useSession(): UseSession {
  const session = useState<SessionView | null>('session', () => null)
  const isKnown = useState('session-is-known', () => false)
  const request = useApi()
  const { leave } = useLeaveDevice()

  return {
    session,
    isKnown,
    async refresh() {
      const answer = await request('/api/session')
      session.value = answer.session
      isKnown.value = true
    },
    async signOut() {
      // What the bench left on this device is private, and some of it may be nowhere else.
      if (!await leave()) return
      await api('/api/sign-out', { method: 'POST' })
      // A page loaded anew keeps nothing of what the last person saw.
      reloadNuxtApp({ path: '/sign-in', force: true })
    },
    async changeWorkshop(workshopId) {
      await api('/api/session/workshop', { method: 'PUT', body: { workshopId } })
      reloadNuxtApp({ path: '/', force: true })
    },
  }
}
