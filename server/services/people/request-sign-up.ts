import type { Database } from '#server/db/client'
import { signUps } from '#server/db/tables/people'
import { sendMail } from '#server/mail/send-mail'
import { inTransactionAs } from '#server/services/in-transaction'
import { alreadySignedUpLetter, signUpLetter } from '#server/services/people/letters'
import { newLinkSecret } from '#server/services/people/link-secret'
import { personByEmail } from '#server/services/people/person-by-email'
import { SIGN_UP_LASTS } from '#server/services/people/session-limits'

/** Sends the letter that opens a workshop; to an address that has a person already, one that says so. */
export async function requestSignUp(db: Database, email: string): Promise<void> {
  const { token, tokenHash } = newLinkSecret()
  const isKnown = await inTransactionAs(db, { tokenHash }, async (tx) => {
    if (await personByEmail(tx, email)) return true
    await tx.insert(signUps).values({ tokenHash, email, expiresAt: new Date(Date.now() + SIGN_UP_LASTS) })
    return false
  })
  await sendMail({ to: email, ...(isKnown ? alreadySignedUpLetter() : signUpLetter(token)) })
}
