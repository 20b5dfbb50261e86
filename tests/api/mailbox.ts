import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { z } from 'zod'

const Index = z.array(z.object({ file: z.string(), to: z.array(z.string()), subject: z.string() }))

/** A letter that was really sent, as its reader finds it. */
export interface Letter {
  subject: string
  text: string
  /** The secret of the link in it, when it has one. */
  token: string | undefined
}

/** The letters an address has got so far, oldest first. */
export async function lettersTo(address: string): Promise<Letter[]> {
  const dir = process.env.TEST_MAIL_DIR ?? ''
  const index = Index.parse(JSON.parse(await readFile(join(dir, 'index.json'), 'utf8')))
  return Promise.all(index.filter(mail => mail.to.includes(address)).map(async (mail) => {
    const text = bodyOf(await readFile(join(dir, mail.file), 'utf8'))
    return { subject: mail.subject, text, token: /\/([\w-]{43})\b/.exec(text)?.[1] }
  }))
}

/** The newest letter to an address, once at least `count` have come; some are sent after the answer was given. */
export async function letterTo(address: string, count = 1): Promise<Letter> {
  for (let patience = 0; patience < 200; patience++) {
    const letters = await lettersTo(address)
    const newest = letters.at(-1)
    if (newest && letters.length >= count) return newest
    await delay(25)
  }
  throw new Error(`No letter ${count} came to ${address}.`)
}

/** The secret of the link in the newest letter to an address. */
export async function tokenTo(address: string, count = 1): Promise<string> {
  const { token, text } = await letterTo(address, count)
  if (!token) throw new Error(`No link in the letter to ${address}:\n${text}`)
  return token
}

/** The words of a letter of one part: quoted-printable (RFC 2045) or base64 undone. */
function bodyOf(letter: string): string {
  const [head = '', ...rest] = letter.split(/\r?\n\r?\n/)
  const body = rest.join('\n\n')
  if (/^content-transfer-encoding: base64/im.test(head)) return Buffer.from(body, 'base64').toString('utf8')
  if (!/^content-transfer-encoding: quoted-printable/im.test(head)) return body
  const bytes = body.replace(/=\r?\n/g, '').replace(/=([\dA-F]{2})/g, (_, hex: string) => String.fromCharCode(Number.parseInt(hex, 16)))
  return Buffer.from(bytes, 'latin1').toString('utf8')
}
