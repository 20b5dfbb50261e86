import { createHash, createHmac, hkdfSync } from 'node:crypto'

const SECRET_BYTES = 24

/** What is stored of a link's secret: enough to know it again, not enough to make it. */
export function tokenHash(token: string): string {
  return createHash('sha256').update(token).digest('hex')
}

/**
 * The secret of a card's link: 192 bits that only this server can work out, so that the workshop can read its link again
 * though the database holds a hash only. A card shared anew gets another.
 */
export function cardToken(serverSecret: string, cardId: string, sharedAt: Date): string {
  const key = Buffer.from(hkdfSync('sha256', serverSecret, '', 'countershade card link', 32))
  return createHmac('sha256', key).update(`${cardId} ${sharedAt.getTime()}`).digest().subarray(0, SECRET_BYTES).toString('base64url')
}
