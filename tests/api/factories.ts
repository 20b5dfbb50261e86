import { memberships, persons, sessions, workshops } from '#server/db/tables/people'
import type { Ctx } from '#server/services/ctx'
import { inTransactionAs } from '#server/services/in-transaction'
import type { Role } from '#shared/people/roles'
import { testDatabase } from './database'

/** Somebody in a workshop of a test, signed in. */
export interface TestPerson {
  ctx: Ctx
  email: string
}

/** A workshop of its own, empty, with one person in it; each test makes one and deletes nothing. */
export async function testWorkshop({ role = 'owner' as Role, name = 'Test bench' } = {}): Promise<TestPerson & { workshopId: string }> {
  const db = await testDatabase()
  const workshopId = crypto.randomUUID()
  await inTransactionAs(db, { workshopId }, tx => tx.insert(workshops).values({ id: workshopId, name }))
  return { workshopId, ...await testPerson({ workshopId, role }) }
}

/** One more person in a workshop, signed in. Their password is no password: sign up through the service where it matters. */
export async function testPerson({ workshopId, role }: { workshopId: string, role: Role }): Promise<TestPerson> {
  const db = await testDatabase()
  const personId = crypto.randomUUID()
  const sessionId = crypto.randomUUID()
  const email = `${role}-${personId.slice(0, 8)}@bench.example`
  await inTransactionAs(db, { workshopId, personId, sessionId }, async (tx) => {
    await tx.insert(persons).values({ id: personId, email, name: `Test ${role}`, passwordHash: 'none' })
    await tx.insert(memberships).values({ workshopId, personId, role })
    await tx.insert(sessions).values({ id: sessionId, personId, workshopId, expiresAt: new Date(Date.now() + 3_600_000) })
  })
  return { email, ctx: { db, personId, sessionId, workshopId, role } }
}
