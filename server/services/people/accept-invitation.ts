import { and, eq, gt, isNull } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { invitations, memberships, workshops } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { declare, inTransactionAs } from '#server/services/in-transaction'
import { addPerson } from '#server/services/people/add-person'
import { SIGN_IN_ACCOUNT, SIGN_IN_HERE, countTry } from '#server/services/people/count-try'
import { chooseWorkshop } from '#server/services/people/choose-workshop'
import { hashOfToken } from '#server/services/people/link-secret'
import { openSession } from '#server/services/people/open-session'
import { hashPassword, passwordFits } from '#server/services/people/password-hash'
import { type PersonRow, personByEmail } from '#server/services/people/person-by-email'
import type { Visitor } from '#server/services/people/sign-in'
import { Problem } from '#shared/errors/problem'
import type { Acceptance, InvitationLinkView } from '#shared/people/invitation'

type InvitationRow = typeof invitations.$inferSelect

/** What an invitation's link leads to, for whoever holds it; `visitor` when they are signed in. Changes nothing. */
export async function findInvitation(db: Database, token: string, visitor: PersonCtx | null): Promise<InvitationLinkView> {
  return inTransactionAs(db, { tokenHash: hashOfToken(token) }, async (tx) => {
    const invitation = await invitationOf(tx, token)
    const [workshop] = await tx.select({ name: workshops.name }).from(workshops).where(eq(workshops.id, invitation.workshopId))
    const person = await personByEmail(tx, invitation.email)
    const as = !person ? 'new' : person.id === visitor?.personId ? 'me' : 'known'
    return { workshopName: workshop?.name ?? '', role: invitation.role, email: invitation.email, as }
  })
}

/**
 * Brings the invited one into the workshop and gives the id of the session they are in: the one they had, or a new one.
 * The link alone is not enough for somebody who has a password: it is asked for.
 */
export async function acceptInvitation(
  db: Database, token: string, acceptance: Acceptance, device: Visitor, visitor: PersonCtx | null,
): Promise<string> {
  const tokenHash = hashOfToken(token)
  const { invitation, known } = await inTransactionAs(db, { tokenHash }, async (tx) => {
    const invitation = await invitationOf(tx, token)
    return { invitation, known: await personByEmail(tx, invitation.email) }
  })
  const entry = await entryOf(db, invitation.email, acceptance, known, device, visitor)

  return inTransactionAs(db, { tokenHash }, async (tx) => {
    const [accepted] = await tx.update(invitations).set({ acceptedAt: new Date() })
      .where(goesOn(tokenHash)).returning()
    if (!accepted) throw new Problem({ code: 'people/link-ended' })
    const person = entry.as === 'new' ? await addPerson(tx, { email: accepted.email, name: entry.name, passwordHash: entry.passwordHash }) : entry.person
    await declare(tx, { personId: person.id, workshopId: accepted.workshopId })
    await tx.insert(memberships).values({ workshopId: accepted.workshopId, personId: person.id, role: accepted.role }).onConflictDoNothing()
    if (entry.as !== 'me') return openSession(tx, person.id, accepted.workshopId, device.device)
    await declare(tx, { sessionId: entry.sessionId })
    await chooseWorkshop({ db: tx, personId: person.id, sessionId: entry.sessionId }, accepted.workshopId)
    return entry.sessionId
  })
}

type Entry
  = | { as: 'me', person: PersonRow, sessionId: string }
    | { as: 'known', person: PersonRow }
    | { as: 'new', name: string, passwordHash: string }

/** Makes sure that whoever holds the link may come in the way they say. Slow where a password is weighed, so outside any transaction. */
async function entryOf(
  db: Database, email: string, acceptance: Acceptance, known: PersonRow | undefined, device: Visitor, visitor: PersonCtx | null,
): Promise<Entry> {
  switch (acceptance.as) {
    case 'me':
      if (!known || !visitor || visitor.personId !== known.id) throw new Problem({ code: 'auth/signed-out' })
      return { as: 'me', person: known, sessionId: visitor.sessionId }
    case 'known':
      await countTry(db, SIGN_IN_HERE, device.address, email)
      await countTry(db, SIGN_IN_ACCOUNT, email)
      if (!await passwordFits(acceptance.password, known?.passwordHash) || !known) throw new Problem({ code: 'auth/wrong-sign-in' })
      return { as: 'known', person: known }
    case 'new':
      if (known) throw new Problem({ code: 'people/email-taken' })
      return { as: 'new', name: acceptance.name, passwordHash: await hashPassword(acceptance.password) }
  }
}

async function invitationOf(tx: Database, token: string): Promise<InvitationRow> {
  const [invitation] = await tx.select().from(invitations).where(goesOn(hashOfToken(token)))
  if (!invitation) throw new Problem({ code: 'people/link-ended' })
  return invitation
}

function goesOn(tokenHash: string) {
  return and(eq(invitations.tokenHash, tokenHash), isNull(invitations.acceptedAt), gt(invitations.expiresAt, new Date()))
}
