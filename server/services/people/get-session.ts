import { asc, eq } from 'drizzle-orm'
import { memberships, persons, workshops } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { settingsOf } from '#server/services/people/workshop-view'
import { Problem } from '#shared/errors/problem'
import type { SessionView } from '#shared/people/session'

/** Who is signed in, in which workshop, as what, and where else they could be. */
export async function getSession(ctx: PersonCtx, workshopId: string | null): Promise<SessionView> {
  return inTransaction(ctx, async (tx) => {
    const [person] = await tx.db.select({ id: persons.id, name: persons.name, email: persons.email })
      .from(persons).where(eq(persons.id, tx.personId))
    if (!person) throw new Problem({ code: 'auth/signed-out' })
    const places = await tx.db.select({ workshop: workshops, role: memberships.role }).from(memberships)
      .innerJoin(workshops, eq(workshops.id, memberships.workshopId))
      .where(eq(memberships.personId, tx.personId)).orderBy(asc(workshops.name), asc(workshops.id))
    const here = places.find(place => place.workshop.id === workshopId)
    return {
      person,
      workshop: here
        ? { id: here.workshop.id, name: here.workshop.name, isDemo: here.workshop.isDemo, ...settingsOf(here.workshop) }
        : null,
      role: here?.role ?? null,
      workshops: places.map(place => ({ id: place.workshop.id, name: place.workshop.name, role: place.role })),
    }
  })
}
