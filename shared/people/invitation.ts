import { z } from 'zod'
import { Email, PersonName, NewPassword, TriedPassword } from './person'
import { Role } from './roles'

/** Asking somebody in. */
export const InvitationDraft = z.object({ email: Email, role: Role })
export type InvitationDraft = z.output<typeof InvitationDraft>

export const InvitationParams = z.object({ invitationId: z.uuid() })

/** An invitation that was not accepted yet, as an owner sees it. */
export interface InvitationView {
  id: string
  email: string
  role: Role
  sentAt: string
  expiresAt: string
  hasEnded: boolean
}

/** How the invited one comes in: signed in already, with the password they have, or as somebody new. */
export const Acceptance = z.discriminatedUnion('as', [
  z.object({ as: z.literal('me') }),
  z.object({ as: z.literal('known'), password: TriedPassword }),
  z.object({ as: z.literal('new'), name: PersonName, password: NewPassword }),
])
export type Acceptance = z.output<typeof Acceptance>

/** What the holder of an invitation's link sees before they accept. */
export interface InvitationLinkView {
  workshopName: string
  role: Role
  email: string
  /** The way in that fits: whoever holds the link reads this address's mail, so telling them is telling nobody else. */
  as: Acceptance['as']
}
