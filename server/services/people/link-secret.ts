import { createHash, randomBytes } from 'node:crypto'

/** The secret of a link as it goes out by mail, and the only form of it that is kept. */
export function newLinkSecret(): { token: string, tokenHash: string } {
  const token = randomBytes(32).toString('base64url')
  return { token, tokenHash: hashOfToken(token) }
}

/** What the database knows a link's secret by: SHA-256, hex. */
export function hashOfToken(token: string): string {
  return createHash('sha256').update(token).digest('hex')
}
