import { and, eq, gt } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { passwordResets, persons, sessions } from '#server/db/tables/people'
import { sendMail } from '#server/mail/send-mail'
import { declare, inTransactionAs } from '#server/services/in-transaction'
import { passwordChangedLetter, resetLetter } from '#server/services/people/letters'
import { hashOfToken, newLinkSecret } from '#server/services/people/link-secret'
import { hashPassword } from '#server/services/people/password-hash'
import { personByEmail } from '#server/services/people/person-by-email'
import { sendNotice } from '#server/services/people/send-notice'
import { RESET_LASTS } from '#server/services/people/session-limits'
import { Problem } from '#shared/errors/problem'

/** Sends the letter for a new password, if the address is somebody's. Whoever asks learns neither. */
export async function requestPasswordReset(db: Database, email: string): Promise<void> {
  const { token, tokenHash } = newLinkSecret()
  const isKnown = await inTransactionAs(db, {}, async (tx) => {
    const person = await personByEmail(tx, email)
    if (!person) return false
    await declare(tx, { personId: person.id })
    await tx.insert(passwordResets).values({ tokenHash, personId: person.id, expiresAt: new Date(Date.now() + RESET_LASTS) })
    return true
  })
  if (isKnown) await sendMail({ to: email, ...resetLetter(token) })
}

/** Refuses a link to a new password that ended; changes nothing. */
export async function checkPasswordReset(db: Database, token: string): Promise<void> {
  const tokenHash = hashOfToken(token)
  const rows = await inTransactionAs(db, { tokenHash }, tx => tx.select().from(passwordResets).where(goesOn(tokenHash)))
  if (rows.length === 0) throw new Problem({ code: 'people/link-ended' })
}

/** Sets a new password by the link in a letter. Every session of the person ends, and every such link. */
export async function resetPassword(db: Database, token: string, password: string): Promise<void> {
  const tokenHash = hashOfToken(token)
  await checkPasswordReset(db, token)
  const passwordHash = await hashPassword(password)
  const email = await inTransactionAs(db, { tokenHash }, async (tx) => {
    const [reset] = await tx.delete(passwordResets).where(goesOn(tokenHash)).returning()
    if (!reset) throw new Problem({ code: 'people/link-ended' })
    await declare(tx, { personId: reset.personId })
    const [person] = await tx.update(persons).set({ passwordHash }).where(eq(persons.id, reset.personId)).returning()
    await tx.delete(sessions).where(eq(sessions.personId, reset.personId))
    await tx.delete(passwordResets).where(eq(passwordResets.personId, reset.personId))
    return person?.email
  })
  if (email) await sendNotice({ to: email, ...passwordChangedLetter() })
}

function goesOn(tokenHash: string) {
  return and(eq(passwordResets.tokenHash, tokenHash), gt(passwordResets.expiresAt, new Date()))
}
