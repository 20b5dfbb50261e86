import { computed } from 'vue'
import { api, useApi } from '~/composables/api/api'
import type { InvitationDraft } from '#shared/people/invitation'
import type { Role } from '#shared/people/roles'
import { useMay } from './use-may'

const PEOPLE_KEY = 'people'
const INVITATIONS_KEY = 'invitations'

/** Who is in the workshop and, for owners, who was asked in. */
export async function usePeople() {
  const request = useApi()
  const mayChange = useMay()('people:change')
  const [people, invitations] = await Promise.all([
    useAsyncData(PEOPLE_KEY, () => request('/api/people')),
    useAsyncData(INVITATIONS_KEY, async () => mayChange ? request('/api/invitations') : []),
  ])
  return {
    people: computed(() => people.data.value ?? []),
    invitations: computed(() => invitations.data.value ?? []),
    error: people.error,
    mayChange,
  }
}

/** What an owner does with people; each throws when it is refused. */
export function usePeopleEdits() {
  const again = () => refreshNuxtData([PEOPLE_KEY, INVITATIONS_KEY])

  return {
    async invite(draft: InvitationDraft) {
      await api('/api/invitations', { method: 'POST', body: draft })
      await again()
    },
    async sendAgain(invitationId: string) {
      await api('/api/invitations/:invitationId/again', { params: { invitationId }, method: 'POST', body: {} })
      await again()
    },
    async withdraw(invitationId: string) {
      await api('/api/invitations/:invitationId', { params: { invitationId }, method: 'DELETE' })
      await again()
    },
    async changeRole(personId: string, role: Role) {
      try {
        await api('/api/people/:personId', { params: { personId }, method: 'PATCH', body: { role } })
      }
      finally {
        // Refused or not: what is shown is what is so.
        await again()
      }
    },
    async remove(personId: string) {
      await api('/api/people/:personId', { params: { personId }, method: 'DELETE' })
      await again()
    },
  }
}
