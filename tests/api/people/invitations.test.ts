import { expect, it } from 'vitest'
import { acceptInvitation, findInvitation } from '#server/services/people/accept-invitation'
import { getSession } from '#server/services/people/get-session'
import { invitePerson, listInvitations, sendInvitationAgain, withdrawInvitation } from '#server/services/people/invitations'
import { listPeople } from '#server/services/people/list-people'
import { resumeSession } from '#server/services/people/resume-session'
import { asOwner } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { letterTo, tokenTo } from '../mailbox'

const HERE = { address: '192.0.2.2', device: 'Phone' }
const NEW = { as: 'new', name: 'Noor', password: 'three coats of pearl' } as const

it('brings somebody new in with the role they were asked in for', async () => {
  const { ctx } = await testWorkshop({ name: 'Heron sheds' })
  await invitePerson(ctx, { email: 'noor@heron.example', role: 'bench' })
  const token = await tokenTo('noor@heron.example')
  expect((await letterTo('noor@heron.example')).subject).toContain('Heron sheds')
  expect(await findInvitation(ctx.db, token, null)).toEqual({ workshopName: 'Heron sheds', role: 'bench', email: 'noor@heron.example', as: 'new' })

  const session = await resumeSession(ctx.db, await acceptInvitation(ctx.db, token, NEW, HERE, null))
  expect(session?.membership).toEqual({ workshopId: ctx.workshopId, role: 'bench' })
  expect((await listPeople(ctx)).map(person => person.name)).toEqual(['Noor', 'Test owner'])
  expect(await listInvitations(ctx)).toEqual([])
})

it('takes somebody who is signed in into one more workshop, in the session they have', async () => {
  const { ctx } = await testWorkshop()
  const guest = await testWorkshop({ role: 'owner' })
  await invitePerson(ctx, { email: guest.email, role: 'desk' })
  const token = await tokenTo(guest.email)
  expect((await findInvitation(ctx.db, token, guest.ctx)).as).toBe('me')

  const sessionId = await acceptInvitation(ctx.db, token, { as: 'me' }, HERE, guest.ctx)
  expect(sessionId).toBe(guest.ctx.sessionId)
  const view = await getSession(guest.ctx, ctx.workshopId)
  expect(view.role).toBe('desk')
  expect(view.workshops).toHaveLength(2)
})

it('asks somebody who has a password for it: the link alone does not sign them in', async () => {
  const { ctx } = await testWorkshop()
  await invitePerson(ctx, { email: 'known@heron.example', role: 'bench' })
  await acceptInvitation(ctx.db, await tokenTo('known@heron.example'), NEW, HERE, null)
  const { ctx: other } = await testWorkshop()
  await invitePerson(other, { email: 'known@heron.example', role: 'painter' })
  const token = await tokenTo('known@heron.example', 2)

  expect((await findInvitation(ctx.db, token, null)).as).toBe('known')
  await expect(acceptInvitation(ctx.db, token, { ...NEW, password: 'some other password' }, HERE, null))
    .rejects.toMatchObject({ data: { code: 'people/email-taken' } })
  await expect(acceptInvitation(ctx.db, token, { as: 'known', password: 'not this one' }, HERE, null))
    .rejects.toMatchObject({ data: { code: 'auth/wrong-sign-in' } })
  await expect(acceptInvitation(ctx.db, token, { as: 'me' }, HERE, ctx))
    .rejects.toMatchObject({ data: { code: 'auth/signed-out' } })
  const sessionId = await acceptInvitation(ctx.db, token, { as: 'known', password: NEW.password }, HERE, null)
  expect((await resumeSession(ctx.db, sessionId))?.membership).toEqual({ workshopId: other.workshopId, role: 'painter' })
})

it('ends a link that was used, taken back, sent anew or left too long', async () => {
  const { ctx } = await testWorkshop()
  const ended = expect.objectContaining({ data: { code: 'people/link-ended' } })

  await invitePerson(ctx, { email: 'a@heron.example', role: 'desk' })
  const used = await tokenTo('a@heron.example')
  await acceptInvitation(ctx.db, used, NEW, HERE, null)
  await expect(acceptInvitation(ctx.db, used, NEW, HERE, null)).rejects.toEqual(ended)

  const taken = await invitePerson(ctx, { email: 'b@heron.example', role: 'desk' })
  await withdrawInvitation(ctx, taken.id)
  await expect(findInvitation(ctx.db, await tokenTo('b@heron.example'), null)).rejects.toEqual(ended)

  const again = await invitePerson(ctx, { email: 'c@heron.example', role: 'desk' })
  const first = await tokenTo('c@heron.example')
  await sendInvitationAgain(ctx, again.id)
  await expect(findInvitation(ctx.db, first, null)).rejects.toEqual(ended)
  await expect(findInvitation(ctx.db, await tokenTo('c@heron.example', 2), null)).resolves.toMatchObject({ role: 'desk' })

  await invitePerson(ctx, { email: 'd@heron.example', role: 'desk' })
  await asOwner(`update invitations set expires_at = now() - interval '1 minute' where email = 'd@heron.example'`)
  await expect(findInvitation(ctx.db, await tokenTo('d@heron.example'), null)).rejects.toEqual(ended)
})

it('lets only one of two who follow the same link at once in', async () => {
  const { ctx } = await testWorkshop()
  await invitePerson(ctx, { email: 'twice@heron.example', role: 'desk' })
  const token = await tokenTo('twice@heron.example')
  const tries = await Promise.allSettled([1, 2].map(() => acceptInvitation(ctx.db, token, NEW, HERE, null)))
  expect(tries.map(one => one.status).sort()).toEqual(['fulfilled', 'rejected'])
})

it('does not ask in whoever is in already', async () => {
  const { ctx, workshopId } = await testWorkshop()
  const { email } = await testPerson({ workshopId, role: 'bench' })
  await expect(invitePerson(ctx, { email, role: 'painter' })).rejects.toMatchObject({ data: { code: 'people/already-member' } })
})

it('takes a workshop\'s name for words, so that nobody mails links in our name', async () => {
  const { ctx } = await testWorkshop({ name: 'Prize\nhttps://bad.example/win' })
  await invitePerson(ctx, { email: 'words@heron.example', role: 'desk' })
  const letter = await letterTo('words@heron.example')
  expect(letter.text).not.toContain('https://bad.example')
  expect(letter.subject).not.toContain('\n')
})

it.each(['painter', 'bench', 'desk'] as const)('does not let a %s ask anybody in', async (role) => {
  const { ctx } = await testWorkshop({ role })
  await expect(invitePerson(ctx, { email: 'x@heron.example', role: 'owner' })).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
})

it('does not find an invitation of another workshop', async () => {
  const { ctx } = await testWorkshop()
  const { ctx: stranger } = await testWorkshop()
  const invitation = await invitePerson(ctx, { email: 'mine@heron.example', role: 'desk' })
  await expect(withdrawInvitation(stranger, invitation.id)).rejects.toMatchObject({ data: { code: 'people/not-found' } })
  expect(await listInvitations(stranger)).toEqual([])
})
