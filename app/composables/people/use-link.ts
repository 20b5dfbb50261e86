import { useApi } from '~/composables/api/api'
import type { InvitationLinkView } from '#shared/people/invitation'

/** The address a sign-up link was sent to. Looking changes nothing. */
export async function useSignUpLink(token: string) {
  const request = useApi()
  return useAsyncData(`sign-up ${token}`, () => request('/api/sign-up/:token', { params: { token } }))
}

/** What an invitation's link leads to. Looking changes nothing. */
export async function useInvitationLink(token: string) {
  const request = useApi()
  return useAsyncData(`invitation ${token}`, (): Promise<InvitationLinkView> => request('/api/invitations/by-link/:token', { params: { token } }))
}

/** Whether a link to a new password still works. Looking changes nothing. */
export async function useResetLink(token: string) {
  const request = useApi()
  return useAsyncData(`reset ${token}`, async () => {
    await request('/api/password/reset/:token', { params: { token } })
    return true
  })
}
