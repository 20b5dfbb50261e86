import { api } from '~/composables/api/api'
import type { WorkshopChange } from '#shared/people/workshop'
import { useSession } from './use-session'

/** Changing the workshop one is in, and opening another; each throws when it is refused. */
export function useWorkshopEdits() {
  const { session, refresh } = useSession()
  const here = () => ({ workshopId: session.value?.workshop?.id ?? '' })

  return {
    async change(change: WorkshopChange) {
      await api('/api/workshops/:workshopId', { params: here(), method: 'PATCH', body: change })
      await refresh()
    },
    async open(name: string) {
      await api('/api/workshops', { method: 'POST', body: { name }, headers: { 'idempotency-key': crypto.randomUUID() } })
      reloadNuxtApp({ path: '/', force: true })
    },
    /** Takes the demo workshop away with everything in it. */
    async removeDemo() {
      await api('/api/workshops/:workshopId', { params: here(), method: 'DELETE' })
      reloadNuxtApp({ path: '/', force: true })
    },
    async leave(personId: string) {
      await api('/api/people/:personId', { params: { personId }, method: 'DELETE' })
      reloadNuxtApp({ path: '/me', force: true })
    },
  }
}
