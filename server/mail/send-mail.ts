import { settings } from '#server/settings'
import { openMailTransport } from '#server/mail/transport'
import type { Mail, MailTransport } from '#server/mail/transport'

let current: MailTransport | undefined

/** Sends one piece of mail from the workshop; rejects when the mail server does not take it. */
export async function sendMail(mail: Mail): Promise<void> {
  current ??= openMailTransport(settings().mail)
  await current.send(mail)
}
