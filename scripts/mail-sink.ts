import { randomUUID } from 'node:crypto'
import { mkdir, readFile, rename, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { SMTPServer } from 'smtp-server'
import type { AddressInfo } from 'node:net'
import type { SMTPServerDataStream } from 'smtp-server'

/** One letter that arrived: who from, who to, and the file it lies in. */
export interface SunkMail {
  file: string
  from: string
  to: string[]
  subject: string
  arrivedAt: string
}

/** A running mail server that delivers nothing. */
export interface MailSink {
  url: string
  close(): Promise<void>
}

const LETTER_BYTES_MAX = 25 * 1024 * 1024
const INDEX = 'index.json'

/** Text of a header as people read it (RFC 2047 encoded words). */
function decodeWords(text: string): string {
  return text
    .replace(/(\?=)\s+(=\?)/g, '$1$2')
    .replace(/=\?([\w-]+)\?([bq])\?([^?]*)\?=/gi, (_, charset: string, coding: string, word: string) => {
      const bytes = coding.toLowerCase() === 'b'
        ? Buffer.from(word, 'base64')
        : Buffer.from(word.replaceAll('_', ' ').replace(/=([0-9a-f]{2})/gi, (__, hex: string) => String.fromCharCode(Number.parseInt(hex, 16))), 'latin1')
      return new TextDecoder(charset).decode(bytes)
    })
}

/** The subject of a letter. */
export function subjectOf(letter: string): string {
  const [head = ''] = letter.split(/\r?\n\r?\n/, 1)
  const [, subject = ''] = /^subject:(.*(?:\r?\n[ \t].*)*)/im.exec(head) ?? []
  return decodeWords(subject.replace(/\r?\n[ \t]+/g, ' ').trim())
}

async function readAll(stream: SMTPServerDataStream): Promise<Buffer> {
  const chunks: Buffer[] = []
  for await (const chunk of stream as AsyncIterable<Buffer>) chunks.push(chunk)
  if (stream.sizeExceeded) throw Object.assign(new Error('The letter is too long'), { responseCode: 552 })
  return Buffer.concat(chunks)
}

async function replaceFile(path: string, text: string): Promise<void> {
  await writeFile(`${path}.new`, text)
  await rename(`${path}.new`, path)
}

/** Starts a mail server on loopback that keeps each letter as an .eml file in `folder`, and lists them in index.json. */
export async function startMailSink(folder: string, onMail: (mail: SunkMail) => void = () => undefined, port = 0): Promise<MailSink> {
  await mkdir(folder, { recursive: true, mode: 0o700 })
  const index = join(folder, INDEX)
  const sunk = JSON.parse(await readFile(index, 'utf8').catch(() => '[]')) as SunkMail[]
  let turn = replaceFile(index, JSON.stringify(sunk, null, 2))

  const keep = async (letter: Buffer, from: string, to: string[]) => {
    const arrivedAt = new Date().toISOString()
    const file = `${arrivedAt.replaceAll(':', '-')}-${randomUUID().slice(0, 8)}.eml`
    await writeFile(join(folder, file), letter)
    const mail: SunkMail = { file, from, to, subject: subjectOf(letter.toString('utf8')), arrivedAt }
    sunk.push(mail)
    turn = turn.then(() => replaceFile(index, JSON.stringify(sunk, null, 2)))
    await turn
    onMail(mail)
  }

  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    size: LETTER_BYTES_MAX,
    onData(stream, session, done) {
      const { mailFrom, rcptTo } = session.envelope
      readAll(stream)
        .then(letter => keep(letter, mailFrom ? mailFrom.address : '', rcptTo.map(one => one.address)))
        .then(() => done(), (error: Error) => done(error))
    },
  })
  // A client that hangs up in the middle is no reason to end.
  server.on('error', () => undefined)
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject)
    server.listen(port, '127.0.0.1', resolve)
  })
  const address = server.server.address() as AddressInfo
  return {
    url: `smtp://127.0.0.1:${address.port}`,
    close: () => new Promise(resolve => server.close(() => resolve())),
  }
}
