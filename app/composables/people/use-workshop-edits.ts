import type { WorkshopChange } from '#shared/people/workshop'
import { useSession } from './use-session'

/** Changing the workshop one is in, and opening another; each throws when it is refused. */
export function useWorkshopEdits() {
  const { session, refresh } = useSession()

  return {
    async change(change: WorkshopChange) {
      await $fetch(`/api/workshops/${session.value?.workshop?.id}`, { method: 'PATCH', body: change })
      await refresh()
    },
    async open(name: string) {
      await $fetch('/api/workshops', { method: 'POST', body: { name }, headers: { 'idempotency-key': crypto.randomUUID() } })
      reloadNuxtApp({ path: '/', force: true })
    },
    /** Takes the demo workshop away with everything in it. */
    async removeDemo() {
      await $fetch(`/api/workshops/${session.value?.workshop?.id}`, { method: 'DELETE' })
      reloadNuxtApp({ path: '/', force: true })
    },
    async leave(personId: string) {
      await $fetch(`/api/people/${personId}`, { method: 'DELETE' })
      reloadNuxtApp({ path: '/me', force: true })
    },
  }
}
