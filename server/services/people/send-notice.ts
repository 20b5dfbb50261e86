import { sendMail } from '#server/mail/send-mail'
import type { Mail } from '#server/mail/transport'

/** Tells somebody by mail what has happened already: a mail server that is away does not undo it. */
export async function sendNotice(mail: Mail): Promise<void> {
  try {
    await sendMail(mail)
  }
  catch (error) {
    console.error(`The letter "${mail.subject}" was not taken:`, error)
  }
}
