import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { SMTPServer } from 'smtp-server'

/** Takes every letter and keeps it as a file, for one run of the tests. */
export async function startThrowAwayMailbox(): Promise<{ url: string, dir: string, stop: () => Promise<void> }> {
  const dir = await mkdtemp(join(tmpdir(), 'cs-mail-'))
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, _session, done) {
      const chunks: Buffer[] = []
      stream.on('data', (chunk: Buffer) => chunks.push(chunk))
      stream.on('end', () => {
        writeFile(join(dir, `${crypto.randomUUID()}.eml`), Buffer.concat(chunks)).then(() => done(), done)
      })
    },
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const address = server.server.address()
  if (address === null || typeof address === 'string') throw new Error('The mailbox has no port.')
  return {
    url: `smtp://127.0.0.1:${address.port}`,
    dir,
    async stop() {
      await new Promise<void>(resolve => server.close(() => resolve()))
      await rm(dir, { recursive: true, force: true })
    },
  }
}
