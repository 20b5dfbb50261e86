import { eq, sql } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { persons } from '#server/db/tables/people'
import { declare } from '#server/services/in-transaction'

export type PersonRow = typeof persons.$inferSelect

/** The person an address belongs to, if there is one. The transaction declares the address from here on. */
export async function personByEmail(tx: Database, email: string): Promise<PersonRow | undefined> {
  await declare(tx, { email })
  const [person] = await tx.select().from(persons).where(eq(sql`lower(${persons.email})`, email))
  return person
}
