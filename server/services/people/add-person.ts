import type { Database } from '#server/db/client'
import { persons } from '#server/db/tables/people'
import { declare } from '#server/services/in-transaction'
import type { PersonRow } from '#server/services/people/person-by-email'
import { Problem } from '#shared/errors/problem'

/** Somebody new, whose address was shown to be theirs. The transaction acts as them from here on. */
export async function addPerson(tx: Database, person: { email: string, name: string, passwordHash: string }): Promise<PersonRow> {
  const id = crypto.randomUUID()
  await declare(tx, { personId: id, email: person.email })
  const [added] = await tx.insert(persons).values({ id, ...person }).onConflictDoNothing().returning()
  if (!added) throw new Problem({ code: 'people/email-taken' })
  return added
}
