import { settings } from '#server/settings'
import type { Mail } from '#server/mail/transport'
import { type Role, ROLE_PURPOSE, ROLE_WORDS } from '#shared/people/roles'

type Letter = Omit<Mail, 'to'>

const FAREWELL = 'Countershade, the notebook for layered paint'

/** Opening a workshop: the link shows that the address is theirs. */
export function signUpLetter(token: string): Letter {
  return letter('Open your workshop', [
    'Somebody, we think you, wants to open a workshop with this address. To name it and choose a password, open:',
    link('sign-up', token),
    'The link works for one day. If it was not you, do nothing: nothing was made.',
  ])
}

/** Opening a workshop with an address that has a person already: told to its mailbox, and to nobody else. */
export function alreadySignedUpLetter(): Letter {
  return letter('You have a place here already', [
    'Somebody, we think you, wanted to open a workshop with this address. You can sign in with it:',
    `${settings().publicUrl}/sign-in`,
    `One more workshop is opened from "Me" once you are signed in. If the password is lost, choose a new one: ${settings().publicUrl}/forgot`,
  ])
}

/** Choosing a new password. */
export function resetLetter(token: string): Letter {
  return letter('Choose a new password', [
    'Somebody, we think you, has lost the password of this address. To choose a new one, open:',
    link('reset', token),
    'The link works once, for one hour. If it was not you, do nothing: the old password still holds.',
  ])
}

/** Being asked into a workshop. */
export function invitationLetter(token: string, invitation: { workshopName: string, inviter: string, role: Role }): Letter {
  const { inviter, role } = invitation
  const workshopName = oneLine(invitation.workshopName)
  return letter(`${workshopName} asks you in`, [
    `${oneLine(inviter)} asks you into the workshop "${workshopName}" as ${ROLE_WORDS[role].toLowerCase()}. ${ROLE_PURPOSE[role]}`,
    'To come in, open:',
    link('invite', token),
    'The link works for seven days. If you do not know them, do nothing.',
  ])
}

/** The password was changed: so that nobody changes it unseen. */
export function passwordChangedLetter(): Letter {
  return letter('Your password was changed', [
    'The password of this address was changed just now, and every other device was signed out.',
    `If it was not you, choose a new one at once: ${settings().publicUrl}/forgot`,
  ])
}

function letter(subject: string, paragraphs: string[]): Letter {
  return { subject, text: `${[...paragraphs, FAREWELL].join('\n\n')}\n` }
}

function link(page: 'sign-up' | 'reset' | 'invite', token: string): string {
  return `${settings().publicUrl}/${page}/${token}`
}

/** What people typed, where it stands among our own words: a name cannot bring lines or links of its own. */
function oneLine(text: string): string {
  return text.replace(/\s+/g, ' ').replace(/\b\w+:\/\/|www\./gi, '').trim()
}
