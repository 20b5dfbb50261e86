import { eq } from 'drizzle-orm'
import { passwordResets, persons } from '#server/db/tables/people'
import { sendNotice } from '#server/services/people/send-notice'
import type { PersonCtx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { SIGN_IN_ACCOUNT, countTry } from '#server/services/people/count-try'
import { endOtherSessions } from '#server/services/people/end-session'
import { passwordChangedLetter } from '#server/services/people/letters'
import { hashPassword, passwordFits } from '#server/services/people/password-hash'
import { Problem } from '#shared/errors/problem'
import type { PasswordChange } from '#shared/people/person'

/** Changes one's own password, the old one at hand. Every other session ends at once, and every link to a new password. */
export async function changePassword(ctx: PersonCtx, { current, next }: PasswordChange): Promise<void> {
  const [person] = await inTransaction(ctx, tx => tx.db.select().from(persons).where(eq(persons.id, tx.personId)))
  if (!person) throw new Problem({ code: 'auth/signed-out' })
  await countTry(ctx.db, SIGN_IN_ACCOUNT, person.email)
  if (!await passwordFits(current, person.passwordHash)) throw new Problem({ code: 'auth/wrong-sign-in' })

  const passwordHash = await hashPassword(next)
  await inTransaction(ctx, async (tx) => {
    await tx.db.update(persons).set({ passwordHash }).where(eq(persons.id, tx.personId))
    await tx.db.delete(passwordResets).where(eq(passwordResets.personId, tx.personId))
    await endOtherSessions(tx)
  })
  await sendNotice({ to: person.email, ...passwordChangedLetter() })
}
