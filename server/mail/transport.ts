import { createTransport } from 'nodemailer'
import type { MailSettings } from '#server/settings'

/** How long a mail server may keep us waiting at any one point, in milliseconds. */
const PATIENCE = 15_000

/** One piece of mail, in plain words and, where it helps, as a page. */
export interface Mail {
  to: string
  subject: string
  text: string
  html?: string
  replyTo?: string
  /** The same letter sent twice carries the same id, so that a mailbox can tell. */
  messageId?: string
}

/** Takes mail to the mail server. */
export interface MailTransport {
  /** Hands one piece of mail over; resolves when the mail server has taken it. */
  send(mail: Mail): Promise<void>
  /** Ends the connections. */
  close(): void
}

/** Opens the way to a mail server. Mail never reads files or addresses: what is sent is what was given. */
export function openMailTransport(place: MailSettings): MailTransport {
  const transport = createTransport({
    url: place.url,
    pool: true,
    maxConnections: 2,
    connectionTimeout: PATIENCE,
    greetingTimeout: PATIENCE,
    socketTimeout: PATIENCE,
    disableFileAccess: true,
    disableUrlAccess: true,
  }, { from: place.from })

  return {
    async send(mail) {
      await transport.sendMail(mail)
    },
    close: () => transport.close(),
  }
}
