import { changeRole } from '#server/services/people/change-role'
import { invitePerson } from '#server/services/people/invitations'
import { requestPasswordReset } from '#server/services/people/reset-password'
import { requestSignUp } from '#server/services/people/request-sign-up'
import { testPerson } from '../factories'
import { tokenTo } from '../mailbox'
import type { AccessRow, Ground, Who } from './row'

/** The same for everybody, signed in or not. */
const anybody = (status: number): Record<Who, number> =>
  ({ owner: status, painter: status, bench: status, desk: status, stranger: status, signedOut: status })

/** The same for whoever is signed in, in whatever workshop. */
const signedIn = (status: number): Record<Who, number> => ({ ...anybody(status), signedOut: 401 })

/** Owners only; the owner of another workshop does not find what is asked for. */
const ownersOnly = (status: number, stranger = 404): Record<Who, number> =>
  ({ owner: status, painter: 403, bench: 403, desk: 403, stranger, signedOut: 401 })

const freshAddress = () => `${crypto.randomUUID()}@door.example`

async function signUpToken({ owner }: Ground) {
  const email = freshAddress()
  await requestSignUp(owner.db, email)
  return tokenTo(email)
}

async function resetToken({ owner }: Ground) {
  const { email } = await testPerson({ workshopId: owner.workshopId, role: 'desk' })
  await requestPasswordReset(owner.db, email)
  return tokenTo(email)
}

async function invitation({ owner }: Ground) {
  const email = freshAddress()
  const view = await invitePerson(owner, { email, role: 'bench' })
  return { id: view.id, email, token: () => tokenTo(email) }
}

/** Signing in and out, people, invitations, workshops, sessions and passwords. */
export const PEOPLE_ACCESS: AccessRow[] = [
  { method: 'GET', path: '/api/session', who: anybody(200), make: () => ({ url: '/api/session' }) },
  {
    method: 'PUT', path: '/api/session/workshop', who: { ...signedIn(200), stranger: 404 },
    make: ({ owner }) => ({ url: '/api/session/workshop', body: { workshopId: owner.workshopId } }),
  },
  // A sign-in with a wrong password: that it is refused alike for all says that the door asks nothing else.
  { method: 'POST', path: '/api/sign-in', who: anybody(401), make: () => ({ url: '/api/sign-in', body: { email: freshAddress(), password: 'not known here' } }) },
  { method: 'POST', path: '/api/sign-out', who: anybody(204), make: () => ({ url: '/api/sign-out', body: {} }) },
  { method: 'POST', path: '/api/sign-up', who: anybody(202), make: () => ({ url: '/api/sign-up', body: { email: freshAddress() } }) },
  { method: 'GET', path: '/api/sign-up/[token]', who: anybody(200), make: async ground => ({ url: `/api/sign-up/${await signUpToken(ground)}` }) },
  {
    method: 'POST', path: '/api/sign-up/[token]', who: anybody(201),
    make: async ground => ({ url: `/api/sign-up/${await signUpToken(ground)}`, body: { name: 'Ea', workshopName: 'Door', password: 'a door that opens' } }),
  },
  { method: 'POST', path: '/api/password/forgot', who: anybody(202), make: () => ({ url: '/api/password/forgot', body: { email: freshAddress() } }) },
  { method: 'GET', path: '/api/password/reset/[token]', who: anybody(204), make: async ground => ({ url: `/api/password/reset/${await resetToken(ground)}` }) },
  {
    method: 'POST', path: '/api/password/reset/[token]', who: anybody(204),
    make: async ground => ({ url: `/api/password/reset/${await resetToken(ground)}`, body: { password: 'a door that opens' } }),
  },
  // The people of these tests have no password, so that the old one is always wrong: whoever is signed in is asked for it.
  { method: 'PUT', path: '/api/password', who: signedIn(401), make: () => ({ url: '/api/password', body: { current: 'not known', next: 'a door that opens' } }) },
  { method: 'GET', path: '/api/people', who: signedIn(200), make: ({ desk }) => ({ url: '/api/people', secret: [desk.personId] }) },
  {
    method: 'PATCH', path: '/api/people/[personId]', who: ownersOnly(204),
    make: ({ desk }) => ({ url: `/api/people/${desk.personId}`, body: { role: 'bench' } }),
  },
  {
    method: 'DELETE', path: '/api/people/[personId]', who: ownersOnly(204),
    make: async ({ owner }) => {
      const { ctx } = await testPerson({ workshopId: owner.workshopId, role: 'painter' })
      await changeRole(owner, ctx.personId, 'bench')
      return { url: `/api/people/${ctx.personId}` }
    },
  },
  { method: 'POST', path: '/api/workshops', who: signedIn(201), make: () => ({ url: '/api/workshops', body: { name: 'One more' } }) },
  {
    method: 'GET', path: '/api/workshops/[workshopId]', who: { ...signedIn(200), stranger: 404 },
    make: ({ owner }) => ({ url: `/api/workshops/${owner.workshopId}` }),
  },
  {
    method: 'PATCH', path: '/api/workshops/[workshopId]', who: ownersOnly(200),
    make: ({ owner }) => ({ url: `/api/workshops/${owner.workshopId}`, body: { units: 'inch' } }),
  },
  // Not a demo: an owner gets as far as being told so.
  { method: 'DELETE', path: '/api/workshops/[workshopId]', who: ownersOnly(409), make: ({ owner }) => ({ url: `/api/workshops/${owner.workshopId}` }) },
  {
    method: 'GET', path: '/api/invitations', who: ownersOnly(200, 200),
    make: async (ground) => {
      const { id, email } = await invitation(ground)
      return { url: '/api/invitations', secret: [id, email] }
    },
  },
  { method: 'POST', path: '/api/invitations', who: ownersOnly(201, 201), make: () => ({ url: '/api/invitations', body: { email: freshAddress(), role: 'desk' } }) },
  { method: 'DELETE', path: '/api/invitations/[invitationId]', who: ownersOnly(204), make: async ground => ({ url: `/api/invitations/${(await invitation(ground)).id}` }) },
  { method: 'POST', path: '/api/invitations/[invitationId]/again', who: ownersOnly(200), make: async ground => ({ url: `/api/invitations/${(await invitation(ground)).id}/again`, body: {} }) },
  {
    method: 'GET', path: '/api/invitations/by-link/[token]', who: anybody(200),
    make: async ground => ({ url: `/api/invitations/by-link/${await (await invitation(ground)).token()}` }),
  },
  {
    method: 'POST', path: '/api/invitations/by-link/[token]', who: anybody(200), letsIn: true,
    make: async ground => ({
      url: `/api/invitations/by-link/${await (await invitation(ground)).token()}`,
      body: { as: 'new', name: 'Ea', password: 'a door that opens' },
    }),
  },
  { method: 'GET', path: '/api/sessions', who: signedIn(200), make: ({ owner }) => ({ url: '/api/sessions', secret: [owner.sessionId] }) },
  { method: 'DELETE', path: '/api/sessions', who: signedIn(204), make: () => ({ url: '/api/sessions' }) },
  // One's own only, whatever the role.
  {
    method: 'DELETE', path: '/api/sessions/[sessionId]', who: { owner: 204, painter: 404, bench: 404, desk: 404, stranger: 404, signedOut: 401 },
    make: ({ owner }) => ({ url: `/api/sessions/${owner.sessionId}` }),
  },
]
