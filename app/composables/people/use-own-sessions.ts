import { computed } from 'vue'
import type { PasswordChange } from '#shared/people/person'

const KEY = 'own sessions'

/** Where one is signed in, and the ways to end it. */
export async function useOwnSessions() {
  const request = useRequestFetch()
  const { data, error, refresh } = await useAsyncData(KEY, () => request('/api/sessions'))

  return {
    sessions: computed(() => data.value ?? []),
    error,
    async end(sessionId: string) {
      await $fetch(`/api/sessions/${sessionId}`, { method: 'DELETE' })
      await refresh()
    },
    async endOthers() {
      await $fetch('/api/sessions', { method: 'DELETE' })
      await refresh()
    },
    /** Every other session ends with the old password. */
    async changePassword(change: PasswordChange) {
      await $fetch('/api/password', { method: 'PUT', body: change })
      await refresh()
    },
  }
}
