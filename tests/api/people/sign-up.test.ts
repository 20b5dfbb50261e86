import { expect, it } from 'vitest'
import type { Database } from '#server/db/client'
import { listBlanks } from '#server/services/blank/list-blanks'
import { getSession } from '#server/services/people/get-session'
import { requestSignUp } from '#server/services/people/request-sign-up'
import { resumeSession } from '#server/services/people/resume-session'
import { signIn } from '#server/services/people/sign-in'
import { findSignUp, signUp } from '#server/services/people/sign-up'
import { asOwner, testDatabase } from '../database'
import { letterTo, tokenTo } from '../mailbox'

const HERE = { address: '192.0.2.1', device: 'Tablet' }
const WANTED = { name: 'Ida', workshopName: 'Alder bench', password: 'bleak in slack water' }

async function signedUp(db: Database, email: string) {
  await requestSignUp(db, email)
  const sessionId = await signUp(db, await tokenTo(email), WANTED, 'Tablet')
  const session = await resumeSession(db, sessionId)
  if (!session) throw new Error('no session')
  return session
}

it('opens a furnished workshop for whoever follows the link in the letter, as its owner', async () => {
  const db = await testDatabase()
  const session = await signedUp(db, 'ida@alder.example')
  const view = await getSession(session, session.membership?.workshopId ?? null)
  expect(view).toMatchObject({ person: { name: 'Ida', email: 'ida@alder.example' }, workshop: { name: 'Alder bench', units: 'metric' }, role: 'owner' })
  const blanks = await listBlanks({ ...session, workshopId: view.workshop!.id, role: 'owner' })
  expect(blanks).toHaveLength(9)
})

it('lets the new owner in by address and password, whatever the case of the address', async () => {
  const db = await testDatabase()
  await signedUp(db, 'case@alder.example')
  await expect(signIn(db, { email: 'case@alder.example', password: WANTED.password }, HERE)).resolves.toMatch(/^[\da-f-]{36}$/)
  await expect(signIn(db, { email: 'case@alder.example', password: 'bleak in fast water' }, HERE))
    .rejects.toMatchObject({ data: { code: 'auth/wrong-sign-in' } })
})

it('refuses a link that was used, and one that was never sent', async () => {
  const db = await testDatabase()
  await requestSignUp(db, 'once@alder.example')
  const token = await tokenTo('once@alder.example')
  expect(await findSignUp(db, token)).toBe('once@alder.example')
  await signUp(db, token, WANTED, 'Tablet')
  for (const dead of [token, 'a'.repeat(43)])
    await expect(signUp(db, dead, WANTED, 'Tablet')).rejects.toMatchObject({ data: { code: 'people/link-ended' } })
})

it('keeps no link that could be used by whoever reads the database', async () => {
  const db = await testDatabase()
  await requestSignUp(db, 'hash@alder.example')
  const token = await tokenTo('hash@alder.example')
  const rows = await asOwner<{ token_hash: string }>('select * from sign_ups where email = $1', ['hash@alder.example'])
  expect(rows).toHaveLength(1)
  expect(JSON.stringify(rows)).not.toContain(token)
})

it('tells only the mailbox that an address has a place already', async () => {
  const db = await testDatabase()
  await signedUp(db, 'known@alder.example')
  await expect(requestSignUp(db, 'known@alder.example')).resolves.toBeUndefined()
  const letter = await letterTo('known@alder.example', 2)
  expect(letter.token).toBeUndefined()
  expect(letter.text).toContain('/sign-in')
})
