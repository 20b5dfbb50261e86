import { execFile } from 'node:child_process'
import { mkdtemp, readdir, rm, chown } from 'node:fs/promises'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'

const run = promisify(execFile)

/** A PostgreSQL for one run of the tests: quick, because nothing in it has to survive. */
export async function startThrowAwayPostgres(): Promise<{ adminUrl: string, stop: () => Promise<void> }> {
  const bin = await newestBin('/usr/lib/postgresql')
  const dir = await mkdtemp(join(tmpdir(), 'cs-pg-'))
  if (process.getuid?.() === 0) await chown(dir, ...await postgresIds())
  const port = await freePort()
  await asPostgres(`${bin}/initdb`, ['-D', `${dir}/data`, '-U', 'postgres', '-A', 'trust', '-E', 'UTF8', '--locale=C.UTF-8', '--no-sync', '--no-instructions'])
  const options = [
    `-p ${port}`, '-c listen_addresses=127.0.0.1', `-c unix_socket_directories=${dir}`, '-c max_connections=200',
    '-c fsync=off', '-c synchronous_commit=off', '-c full_page_writes=off', '-c wal_level=minimal', '-c max_wal_senders=0',
  ].join(' ')
  await asPostgres(`${bin}/pg_ctl`, ['-D', `${dir}/data`, '-l', `${dir}/log`, '-w', '-t', '30', '-s', '-o', options, 'start'])
  return {
    adminUrl: `postgres://postgres@127.0.0.1:${port}/postgres`,
    async stop() {
      await asPostgres(`${bin}/pg_ctl`, ['-D', `${dir}/data`, '-m', 'immediate', '-w', '-s', 'stop'])
      await rm(dir, { recursive: true, force: true })
    },
  }
}

/** PostgreSQL refuses to run as root: then it runs as the account Debian made for it. */
async function asPostgres(command: string, args: string[]): Promise<void> {
  if (process.getuid?.() === 0) await run('runuser', ['-u', 'postgres', '--', command, ...args], { cwd: '/' })
  else await run(command, args, { cwd: '/' })
}

async function postgresIds(): Promise<[number, number]> {
  const id = async (flag: string) => Number((await run('id', [flag, 'postgres'])).stdout)
  return [await id('-u'), await id('-g')]
}

async function newestBin(root: string): Promise<string> {
  const newest = (await readdir(root)).sort((a, b) => Number(a) - Number(b)).at(-1)
  if (!newest) throw new Error(`No PostgreSQL under ${root}`)
  return join(root, newest, 'bin')
}

async function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen(0, '127.0.0.1', () => {
      const address = server.address()
      const port = typeof address === 'object' && address ? address.port : 0
      server.close(() => resolve(port))
    })
  })
}
