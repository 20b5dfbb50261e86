import { and, asc, eq, isNull } from 'drizzle-orm'
import { invitations, persons, workshops } from '#server/db/tables/people'
import { sendMail } from '#server/mail/send-mail'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { INVITATIONS_WORKSHOP, countTry } from '#server/services/people/count-try'
import { invitationLetter } from '#server/services/people/letters'
import { newLinkSecret } from '#server/services/people/link-secret'
import { INVITATION_LASTS } from '#server/services/people/session-limits'
import { Problem } from '#shared/errors/problem'
import type { InvitationDraft, InvitationView } from '#shared/people/invitation'

export type InvitationRow = typeof invitations.$inferSelect

/** Asks somebody into the workshop by mail. An earlier invitation of the same address gives way to this one. */
export async function invitePerson(ctx: Ctx, draft: InvitationDraft): Promise<InvitationView> {
  assertMay(ctx, 'people:change')
  await countTry(ctx.db, INVITATIONS_WORKSHOP, ctx.workshopId)
  return sendInvitation(ctx, async (tx) => {
    await refuseMember(tx, draft.email)
    await tx.db.delete(invitations).where(and(pendingOf(tx), eq(invitations.email, draft.email)))
    return draft
  })
}

/** Sends an invitation anew, with a new link; the link sent before ends. */
export async function sendInvitationAgain(ctx: Ctx, invitationId: string): Promise<InvitationView> {
  assertMay(ctx, 'people:change')
  await countTry(ctx.db, INVITATIONS_WORKSHOP, ctx.workshopId)
  return sendInvitation(ctx, tx => takeBack(tx, invitationId))
}

/** Takes an invitation back; its link ends. */
export async function withdrawInvitation(ctx: Ctx, invitationId: string): Promise<void> {
  assertMay(ctx, 'people:change')
  await inTransaction(ctx, tx => takeBack(tx, invitationId))
}

/** The invitations nobody accepted yet, oldest first. */
export async function listInvitations(ctx: Ctx): Promise<InvitationView[]> {
  assertMay(ctx, 'people:change')
  const rows = await inTransaction(ctx, tx => tx.db.select().from(invitations)
    .where(pendingOf(tx)).orderBy(asc(invitations.createdAt), asc(invitations.id)))
  return rows.map(invitationView)
}

/** Makes a new invitation in place of whatever `prepare` clears away, then sends its letter. */
async function sendInvitation(ctx: Ctx, prepare: (tx: Ctx) => Promise<InvitationDraft>): Promise<InvitationView> {
  const { token, tokenHash } = newLinkSecret()
  const { row, workshopName, inviter } = await inTransaction(ctx, async (tx) => {
    const { email, role } = await prepare(tx)
    const [row] = await tx.db.insert(invitations)
      .values({ workshopId: tx.workshopId, email, role, tokenHash, invitedBy: tx.personId, expiresAt: new Date(Date.now() + INVITATION_LASTS) })
      .returning()
    const [workshop] = await tx.db.select({ name: workshops.name }).from(workshops).where(eq(workshops.id, tx.workshopId))
    const [person] = await tx.db.select({ name: persons.name }).from(persons).where(eq(persons.id, tx.personId))
    return { row: row!, workshopName: workshop?.name ?? '', inviter: person?.name ?? '' }
  })
  await sendMail({ to: row.email, ...invitationLetter(token, { workshopName, inviter, role: row.role }) })
  return invitationView(row)
}

async function takeBack(tx: Ctx, invitationId: string): Promise<InvitationRow> {
  const [row] = await tx.db.delete(invitations).where(and(pendingOf(tx), eq(invitations.id, invitationId))).returning()
  if (!row) throw new Problem({ code: 'people/not-found' })
  return row
}

/** An owner sees who is in the workshop anyway, so that this tells them nothing new. */
async function refuseMember(tx: Ctx, email: string): Promise<void> {
  const [member] = await tx.db.select({ id: persons.id }).from(persons).where(eq(persons.email, email))
  if (member) throw new Problem({ code: 'people/already-member' })
}

function pendingOf(tx: Ctx) {
  return and(eq(invitations.workshopId, tx.workshopId), isNull(invitations.acceptedAt))
}

function invitationView(row: InvitationRow): InvitationView {
  return {
    id: row.id,
    email: row.email,
    role: row.role,
    sentAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
    hasEnded: row.expiresAt.getTime() <= Date.now(),
  }
}
