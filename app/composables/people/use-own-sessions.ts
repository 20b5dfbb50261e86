import { computed } from 'vue'
import { api, useApi } from '~/composables/api/api'
import type { PasswordChange } from '#shared/people/person'

const KEY = 'own sessions'

/** Where one is signed in, and the ways to end it. */
export async function useOwnSessions() {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(KEY, () => request('/api/sessions'))

  return {
    sessions: computed(() => data.value ?? []),
    error,
    async end(sessionId: string) {
      await api('/api/sessions/:sessionId', { params: { sessionId }, method: 'DELETE' })
      await refresh()
    },
    async endOthers() {
      await api('/api/sessions', { method: 'DELETE' })
      await refresh()
    },
    /** Every other session ends with the old password. */
    async changePassword(change: PasswordChange) {
      await api('/api/password', { method: 'PUT', body: change })
      await refresh()
    },
  }
}
