import { and, eq, gt } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { signUps } from '#server/db/tables/people'
import { inTransactionAs } from '#server/services/in-transaction'
import { addPerson } from '#server/services/people/add-person'
import { hashOfToken } from '#server/services/people/link-secret'
import { chooseWorkshop } from '#server/services/people/choose-workshop'
import { openSession } from '#server/services/people/open-session'
import { openWorkshop } from '#server/services/people/open-workshop'
import { hashPassword } from '#server/services/people/password-hash'
import { Problem } from '#shared/errors/problem'
import type { SignUp } from '#shared/people/workshop'

/** The address a sign-up link was sent to; refuses a link that ended. */
export async function findSignUp(db: Database, token: string): Promise<string> {
  const tokenHash = hashOfToken(token)
  const [row] = await inTransactionAs(db, { tokenHash }, tx => tx.select().from(signUps).where(goesOn(tokenHash)))
  if (!row) throw new Problem({ code: 'people/link-ended' })
  return row.email
}

/** Opens a workshop from the link in the letter, with its first owner, and signs them in. The link ends with it. */
export async function signUp(db: Database, token: string, wanted: SignUp, device: string): Promise<string> {
  const tokenHash = hashOfToken(token)
  await findSignUp(db, token)
  const passwordHash = await hashPassword(wanted.password)
  return inTransactionAs(db, { tokenHash }, async (tx) => {
    const [letter] = await tx.delete(signUps).where(goesOn(tokenHash)).returning()
    if (!letter) throw new Problem({ code: 'people/link-ended' })
    const person = await addPerson(tx, { email: letter.email, name: wanted.name, passwordHash })
    const sessionId = await openSession(tx, person.id, null, device)
    const ctx = await openWorkshop(tx, { personId: person.id, sessionId }, wanted.workshopName)
    await chooseWorkshop(ctx, ctx.workshopId)
    return sessionId
  })
}

function goesOn(tokenHash: string) {
  return and(eq(signUps.tokenHash, tokenHash), gt(signUps.expiresAt, new Date()))
}
