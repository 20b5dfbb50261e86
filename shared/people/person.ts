import { z } from 'zod'
import { Role } from './roles'

export const PERSON_NAME_MAX = 80
export const EMAIL_MAX = 254
export const PASSWORD_MIN = 12
export const PASSWORD_MAX = 200

/** An e-mail address as it is kept: without space around it, in small letters. */
export const Email = z.string().trim().toLowerCase().max(EMAIL_MAX).pipe(z.email('This is not an e-mail address.'))

/** A name as it appears beside somebody's work. */
export const PersonName = z.string().trim().min(1, 'A name is missing.').max(PERSON_NAME_MAX)

/** A password being chosen: long rather than strange, and not one and the same character. */
export const NewPassword = z.string()
  .min(PASSWORD_MIN, `At least ${PASSWORD_MIN} characters; a few words are easiest to keep.`)
  .max(PASSWORD_MAX)
  .refine(password => new Set(password).size > 3, 'Use more than three different characters.')

/** A password being tried. */
export const TriedPassword = z.string().min(1, 'The password is missing.').max(PASSWORD_MAX)

/** Signing in. */
export const SignIn = z.object({ email: Email, password: TriedPassword })
export type SignIn = z.output<typeof SignIn>

/** Asking for a letter: to open a workshop, or to choose a new password. */
export const LetterRequest = z.object({ email: Email })
export type LetterRequest = z.output<typeof LetterRequest>

/** Choosing a new password, the old one at hand. */
export const PasswordChange = z.object({ current: TriedPassword, next: NewPassword })
export type PasswordChange = z.output<typeof PasswordChange>

/** Choosing a new password by the link in a letter. */
export const PasswordReset = z.object({ password: NewPassword })
export type PasswordReset = z.output<typeof PasswordReset>

/** The secret part of a link that was sent by mail: 256 random bits. */
export const LinkParams = z.object({ token: z.string().regex(/^[\w-]{43}$/, 'This is not one of our links.') })

export const PersonParams = z.object({ personId: z.uuid() })

/** Giving somebody another role. */
export const RoleChange = z.object({ role: Role })
export type RoleChange = z.output<typeof RoleChange>

/** Somebody of the workshop. Their address is shown to those who may change people. */
export interface PersonView {
  id: string
  name: string
  email: string | null
  role: Role
  since: string
  isYou: boolean
}
