import { expect, it } from 'vitest'
import { changePassword } from '#server/services/people/change-password'
import { endOtherSessions, endSession } from '#server/services/people/end-session'
import { acceptInvitation } from '#server/services/people/accept-invitation'
import { invitePerson } from '#server/services/people/invitations'
import { listSessions } from '#server/services/people/list-sessions'
import { requestPasswordReset, resetPassword } from '#server/services/people/reset-password'
import { type ResumedSession, resumeSession } from '#server/services/people/resume-session'
import { signIn } from '#server/services/people/sign-in'
import { asOwner } from '../database'
import { testWorkshop } from '../factories'
import { letterTo, lettersTo, tokenTo } from '../mailbox'

const HERE = { address: '192.0.2.3', device: 'Computer' }
const OLD = 'a perch in the reeds'
const NEXT = 'a pike under the pier'

/** Somebody with a real password. */
async function withPassword(email: string): Promise<ResumedSession> {
  const { ctx } = await testWorkshop()
  await invitePerson(ctx, { email, role: 'painter' })
  const session = await resumeSession(ctx.db, await acceptInvitation(ctx.db, await tokenTo(email), { as: 'new', name: 'Ansgar', password: OLD }, HERE, null))
  if (!session) throw new Error('no session')
  return session
}

it('sets a new password by letter, ends every session and tells the mailbox', async () => {
  const session = await withPassword('reset@reed.example')
  await requestPasswordReset(session.db, 'reset@reed.example')
  await resetPassword(session.db, await tokenTo('reset@reed.example', 2), NEXT)
  expect(await resumeSession(session.db, session.sessionId)).toBeNull()
  await expect(signIn(session.db, { email: 'reset@reed.example', password: OLD }, HERE)).rejects.toMatchObject({ data: { code: 'auth/wrong-sign-in' } })
  await expect(signIn(session.db, { email: 'reset@reed.example', password: NEXT }, HERE)).resolves.toBeTypeOf('string')
  expect((await letterTo('reset@reed.example', 3)).subject).toBe('Your password was changed')
})

it('uses a link to a new password once, within its hour, and none sent before', async () => {
  const session = await withPassword('once@reed.example')
  const ended = expect.objectContaining({ data: { code: 'people/link-ended' } })
  await requestPasswordReset(session.db, 'once@reed.example')
  const first = await tokenTo('once@reed.example', 2)
  await requestPasswordReset(session.db, 'once@reed.example')
  const second = await tokenTo('once@reed.example', 3)
  await resetPassword(session.db, second, NEXT)
  for (const dead of [first, second]) await expect(resetPassword(session.db, dead, OLD)).rejects.toEqual(ended)

  await requestPasswordReset(session.db, 'once@reed.example')
  const late = await tokenTo('once@reed.example', 5)
  await asOwner(`update password_resets set expires_at = now() - interval '1 second'`)
  await expect(resetPassword(session.db, late, OLD)).rejects.toEqual(ended)
})

it('writes to nobody who has no place here', async () => {
  const { ctx } = await testWorkshop()
  await requestPasswordReset(ctx.db, 'nobody@reed.example')
  expect(await lettersTo('nobody@reed.example')).toEqual([])
})

it('changes a password, ends the other sessions and keeps this one', async () => {
  const session = await withPassword('change@reed.example')
  const elsewhere = await signIn(session.db, { email: 'change@reed.example', password: OLD }, HERE)
  await expect(changePassword(session, { current: NEXT, next: NEXT })).rejects.toMatchObject({ data: { code: 'auth/wrong-sign-in' } })
  await changePassword(session, { current: OLD, next: NEXT })
  expect(await resumeSession(session.db, elsewhere)).toBeNull()
  expect(await resumeSession(session.db, session.sessionId)).not.toBeNull()
})

it('shows one\'s own sessions and ends one, or all the others; never somebody else\'s', async () => {
  const session = await withPassword('list@reed.example')
  const signedIn = () => signIn(session.db, { email: 'list@reed.example', password: OLD }, HERE)
  const second = await signedIn()
  await signedIn()
  expect((await listSessions(session)).map(one => one.isThis).filter(Boolean)).toHaveLength(1)
  await endSession(session, second)
  expect(await listSessions(session)).toHaveLength(2)
  await endOtherSessions(session)
  expect((await listSessions(session)).map(one => one.id)).toEqual([session.sessionId])

  const { ctx: stranger } = await testWorkshop()
  await expect(endSession(stranger, session.sessionId)).rejects.toMatchObject({ data: { code: 'people/not-found' } })
})

it('lets a session that is used go on, and ends one that is not', async () => {
  const { ctx } = await testWorkshop()
  const day = 24 * 3600 * 1000
  await asOwner(`update sessions set expires_at = now() + interval '30 days' where id = $1`, [ctx.sessionId])
  expect(await resumeSession(ctx.db, ctx.sessionId, new Date(Date.now() + 29 * day))).not.toBeNull()
  expect(await resumeSession(ctx.db, ctx.sessionId, new Date(Date.now() + 58 * day))).not.toBeNull()
  expect(await resumeSession(ctx.db, ctx.sessionId, new Date(Date.now() + 90 * day))).toBeNull()
})

it('refuses the eleventh guess at an account from one place, also with the right password, and tells when to come back', async () => {
  const session = await withPassword('guess@reed.example')
  const guess = (password: string, address = '198.51.100.7') => signIn(session.db, { email: 'guess@reed.example', password }, { address, device: '' })
  for (let i = 0; i < 10; i++) await expect(guess('wrong')).rejects.toMatchObject({ data: { code: 'auth/wrong-sign-in' } })
  await expect(guess(OLD)).rejects.toMatchObject({ data: { code: 'auth/too-many-tries', retryAfterSeconds: expect.closeTo(900, -2) } })
  // Its person, elsewhere, is not locked out.
  await expect(guess(OLD, '198.51.100.8')).resolves.toBeTypeOf('string')
})
