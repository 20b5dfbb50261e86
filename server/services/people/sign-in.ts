import { asc, eq } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { memberships } from '#server/db/tables/people'
import { inTransactionAs } from '#server/services/in-transaction'
import { SIGN_IN_ACCOUNT, SIGN_IN_ADDRESS, SIGN_IN_HERE, countTry, forgetTries } from '#server/services/people/count-try'
import { openSession } from '#server/services/people/open-session'
import { passwordFits } from '#server/services/people/password-hash'
import { personByEmail } from '#server/services/people/person-by-email'
import { Problem } from '#shared/errors/problem'
import type { SignIn } from '#shared/people/person'

/** Where a request comes from: the network that asks (see `addressKey`), and what on. */
export interface Visitor {
  address: string
  device: string
}

/** Signs somebody in and gives the new session's id. An unknown address and a wrong password are refused alike, and as slowly. */
export async function signIn(db: Database, { email, password }: SignIn, visitor: Visitor): Promise<string> {
  await countTry(db, SIGN_IN_ADDRESS, visitor.address)
  await countTry(db, SIGN_IN_HERE, visitor.address, email)
  await countTry(db, SIGN_IN_ACCOUNT, email)

  const person = await inTransactionAs(db, {}, tx => personByEmail(tx, email))
  if (!await passwordFits(password, person?.passwordHash) || !person) throw new Problem({ code: 'auth/wrong-sign-in' })

  await forgetTries(db, SIGN_IN_HERE, visitor.address, email)
  return inTransactionAs(db, { personId: person.id }, async (tx) => {
    const [first] = await tx.select({ workshopId: memberships.workshopId }).from(memberships)
      .where(eq(memberships.personId, person.id)).orderBy(asc(memberships.createdAt), asc(memberships.workshopId)).limit(1)
    return openSession(tx, person.id, first?.workshopId ?? null, visitor.device)
  })
}
